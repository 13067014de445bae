package workbook

import (
	"fmt"
	"io"
	"regexp"
	"strconv"
	"strings"
	"time"

	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
)

// calculator finds the values of formulas that no spreadsheet program has
// calculated yet. It leaves alone what could keep it busy for ever: such a
// formula is reported, and a person calculates it by opening and saving the
// workbook.
type calculator struct {
	file *excelize.File // nil: this workbook is not calculated
	left time.Duration  // what may still be spent
}

// Bounds of calculating.
const (
	maxFormulas    = 40_000 // formulas without a value: each can wait for the next, and the stack holds about twice as many
	maxFormula     = 8_192  // letters, as spreadsheet programs have it
	maxRangeCells  = 2_000_000
	calculateFor   = 60 * time.Second
	maxWorkbookXML = 256 << 20 // a sheet to be calculated is held whole, many times its size
)

// restless functions differ from one moment to the next, and the same input is
// to give the same output.
var restless = regexp.MustCompile(`(?i)\b(TODAY|NOW|RAND|RANDBETWEEN)\s*\(`)

// calculate returns the value of a formula that has none in the file.
func (b *Book) calculate(s *sheet, col, row int, f format, formula string) schedule.Cell {
	if b.calc == nil {
		b.calc = b.newCalculator()
	}
	cell := schedule.Cell{Kind: schedule.Uncalculated, Formula: true, Text: "=" + formula}
	if restless.MatchString(formula) {
		return cell
	}
	value, fault, ok := b.calc.value(s.name, cellName(col, row))
	switch {
	case fault != "":
		return schedule.Cell{Kind: schedule.Fault, Formula: true, Text: fault}
	case !ok:
		return cell
	}
	return calculated(value, f)
}

// calculated turns a calculated value, which comes as text, into a cell.
func calculated(value string, f format) schedule.Cell {
	cell := schedule.Cell{Formula: true, Text: value}
	n, err := strconv.ParseFloat(value, 64)
	switch {
	case err == nil && f.date:
		cell.Kind, cell.Number = schedule.Date, n
	case err == nil:
		cell.Kind, cell.Number, cell.Fraction = schedule.Number, n, f.fraction
	case value == "TRUE" || value == "FALSE":
		cell.Kind = schedule.Bool
	case value != "":
		cell.Kind = schedule.Text
	}
	return cell
}

// newCalculator opens the workbook a second time, for calculating alone.
func (b *Book) newCalculator() (c *calculator) {
	c = &calculator{left: calculateFor}
	defer func() {
		if recover() != nil {
			c.file = nil
		}
	}()
	if !b.calculable() {
		return c
	}
	file, err := excelize.OpenReader(io.NewSectionReader(b.data, 0, b.size), excelize.Options{
		UnzipSizeLimit:    4 * maxWorkbookXML,
		UnzipXMLSizeLimit: maxWorkbookXML,
	})
	if err == nil {
		c.file = file
	}
	return c
}

func (c *calculator) close() {
	if c.file != nil {
		c.file.Close()
	}
}

// value calculates one cell. It returns an error value such as #DIV/0! as
// fault, and false where the formula cannot be calculated.
func (c *calculator) value(sheet, cell string) (value, fault string, ok bool) {
	if c.file == nil || c.left <= 0 {
		return "", "", false
	}
	type answer struct {
		value string
		err   error
	}
	done := make(chan answer, 1)
	start := time.Now()
	go func() {
		defer func() {
			if p := recover(); p != nil {
				done <- answer{"", fmt.Errorf("%v", p)}
			}
		}()
		v, err := c.file.CalcCellValue(sheet, cell, excelize.Options{RawCellValue: true})
		done <- answer{v, err}
	}()
	timer := time.NewTimer(c.left)
	defer timer.Stop()
	select {
	case a := <-done:
		c.left -= time.Since(start)
		if a.err != nil && strings.HasPrefix(a.err.Error(), "not support") {
			return "", "", false // a function that the library does not know
		}
		if f := faultOf(a.value, a.err); f != "" || a.err != nil {
			return "", f, false
		}
		return a.value, "", true
	case <-timer.C:
		// It cannot be stopped; it is left to itself and not asked again.
		c.file, c.left = nil, 0
		return "", "", false
	}
}

// faultOf returns the error value of a spreadsheet that an answer stands for,
// if any.
func faultOf(value string, err error) string {
	text := value
	if text == "" && err != nil {
		text = err.Error()
	}
	for _, f := range []string{"#DIV/0!", "#N/A", "#NAME?", "#NULL!", "#NUM!", "#REF!", "#VALUE!", "#SPILL!", "#CALC!"} {
		if text == f {
			return f
		}
	}
	return ""
}
