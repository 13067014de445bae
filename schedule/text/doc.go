// Package text reads and writes schedules as delimited text: comma, semicolon
// or tab; UTF-8 with or without byte order mark, UTF-16 or Windows-1252.
//
// A file is gone through record by record and never held whole. What is
// written is the user's columns to the letter, and the result columns behind
// them in the dialect of the input: its delimiter, decimal mark, encoding,
// line ends and quoting.
package text
