package tradeoff

import (
	"bytes"
	"fmt"
	"image/color"
	"io"
	"strconv"

	"gonum.org/v1/plot"
	"gonum.org/v1/plot/plotter"
	"gonum.org/v1/plot/vg"
	"gonum.org/v1/plot/vg/draw"
	"gonum.org/v1/plot/vg/vgimg"
	_ "gonum.org/v1/plot/vg/vgsvg" // svg
)

// WritePicture draws the amounts over the number of sizes. format is svg or
// png.
func (t *Table) WritePicture(w io.Writer, format string) error {
	var points plotter.XYs
	for _, l := range t.Served() {
		points = append(points, plotter.XY{X: float64(l.Most), Y: l.Amount})
	}
	if len(points) == 0 {
		return fmt.Errorf("there is nothing to draw: so few sizes cannot serve every column")
	}
	p := plot.New()
	p.Title.Text = headingOf(t.Quantity()) + " over the number of sizes: " + t.File
	p.Title.Padding = vg.Points(8)
	p.Title.TextStyle.Font.Size = vg.Points(11)
	p.X.Label.Text, p.Y.Label.Text = "Sizes", headingOf(t.Quantity())
	p.X.Padding, p.Y.Padding = vg.Points(6), vg.Points(6)
	if err := t.drawLines(p, points); err != nil {
		return err
	}
	p.X.Min, p.X.Max = points[0].X-0.5, points[len(points)-1].X+0.5
	margin := max(0.08*(points[0].Y-t.Any.Amount), 0.02*points[0].Y)
	p.Y.Min, p.Y.Max = min(t.Any.Amount, points[len(points)-1].Y)-margin, points[0].Y+margin
	p.X.Tick.Marker = plot.ConstantTicks(wholeTicks(points))
	out, err := canvas(format)
	if err != nil {
		return err
	}
	const edge = 5 * vg.Millimeter
	p.Draw(draw.Crop(draw.New(out), edge, -edge, edge, -edge))
	var picture bytes.Buffer
	if _, err := out.WriteTo(&picture); err != nil {
		return err
	}
	_, err = w.Write(marked(picture.Bytes(), format))
	return err
}

// canvas is what a picture is drawn on: as wide as a text on A4, and with so
// many dots that it prints sharp.
func canvas(format string) (vg.CanvasWriterTo, error) {
	const width, height, dots = 17 * vg.Centimeter, 11 * vg.Centimeter, 240 // an inch
	if format == "png" {
		return vgimg.PngCanvas{Canvas: vgimg.NewWith(vgimg.UseWH(width, height), vgimg.UseDPI(dots))}, nil
	}
	return draw.NewFormattedCanvas(width, height, format)
}

// drawLines draws the amounts, a mark for each, and the amount of any number
// of sizes, to which they fall.
func (t *Table) drawLines(p *plot.Plot, points plotter.XYs) error {
	line, marks, err := plotter.NewLinePoints(points)
	if err != nil {
		return err
	}
	least, err := plotter.NewLine(plotter.XYs{{X: points[0].X - 0.5, Y: t.Any.Amount}, {X: points[len(points)-1].X + 0.5, Y: t.Any.Amount}})
	if err != nil {
		return err
	}
	grid := plotter.NewGrid()
	grid.Vertical.Width = 0
	grid.Horizontal.Color = color.Gray{0xd8}
	line.Color, line.Width = ink(lineColour), vg.Points(1.5)
	marks.Color, marks.Shape, marks.Radius = ink(lineColour), draw.CircleGlyph{}, vg.Points(3)
	least.Color, least.Width, least.Dashes = ink(leastColour), vg.Points(1), []vg.Length{vg.Points(5), vg.Points(3)}
	p.Add(grid, least, line, marks)
	p.Legend.Add("least for so many sizes", line, marks)
	p.Legend.Add(fmt.Sprintf("any number of sizes (%d)", t.Any.Most), least)
	p.Legend.Top, p.Legend.Padding = true, vg.Points(3)
	// The texts stand behind their lines, so that another typeface, which a
	// reader of the SVG may have, does not run over them.
	p.Legend.Left = true
	p.Legend.XOffs, p.Legend.YOffs = 8*vg.Centimeter, -vg.Points(8)
	return nil
}

// wholeTicks puts a tick at every number of sizes.
func wholeTicks(points plotter.XYs) []plot.Tick {
	var ticks []plot.Tick
	for _, pt := range points {
		ticks = append(ticks, plot.Tick{Value: pt.X, Label: strconv.Itoa(int(pt.X))})
	}
	return ticks
}

// ink is a colour from its six hexadecimal digits.
func ink(hex string) color.RGBA {
	v, _ := strconv.ParseUint(hex, 16, 32) // a constant of this package
	return color.RGBA{uint8(v >> 16), uint8(v >> 8), uint8(v), 0xff}
}
