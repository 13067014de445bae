// Package revision sets two issues of a schedule side by side: which member of
// the one is which of the other, what changed, which sections of the old issue
// still pass under the new actions, and what that comes to in tonnes. It also
// decides which sections stay where a schedule is sized anew.
//
// Members are the same where mark, stack and levels are the same. Whatever else
// could be the same member under another name or in another place is reported
// as a candidate and never taken for one.
package revision
