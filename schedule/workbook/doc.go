// Package workbook reads schedules from .xlsx and .xlsm workbooks, and writes
// results back into them so that nothing of the user's is lost.
//
// Reading streams: a sheet of any length goes through in a few megabytes.
// Writing copies every part of the workbook that it need not touch still
// compressed, passes the schedule's sheet through as a stream to which the
// result cells are added, and adds to the others (styles, list of sheets) by
// inserting, so that every byte of the user's stays. The project's own sheets
// are made with excelize in a workbook of their own and grafted; their rows are
// put in on the way, since the library takes long over many cells.
package workbook
