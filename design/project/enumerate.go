package project

// fewChoices is the number of choices up to which they are tried one by one: to
// raise a bound above them all takes about as long.
const fewChoices = 200

// tryAll tries every choice of k sizes that the state leaves open, where they
// are few, and reports whether it did.
func (s *search) tryAll(f *field, k int, state []int8, best *answer) bool {
	var open, maybe []int32
	for j, size := range f.sizes {
		switch state[size] {
		case opened:
			open = append(open, int32(j))
		case undecided:
			maybe = append(maybe, int32(j))
		}
	}
	more := min(k-len(open), len(maybe))
	if choices(len(maybe), more) > fewChoices {
		return false
	}
	s.tryEach(f, open, maybe, more, best)
	return true
}

// tryEach adds so many more columns of maybe to open, in every way.
func (s *search) tryEach(f *field, open, maybe []int32, more int, best *answer) {
	if more == 0 {
		s.improve(f, open, best)
		return
	}
	for i := 0; i+more <= len(maybe); i++ {
		s.tryEach(f, append(open[:len(open):len(open)], maybe[i]), maybe[i+1:], more-1, best)
	}
}

// choices is the number of ways to choose k of n, or more than fewChoices.
func choices(n, k int) int {
	c := 1
	for i := range min(k, n-k) {
		if c = c * (n - i) / (i + 1); c > fewChoices {
			break
		}
	}
	return c
}
