package tradeoff

import (
	"bytes"
	"encoding/binary"
	"hash/crc32"
)

// Marks by which a picture is known again: in a comment of an SVG, and as the
// software of a PNG (ISO/IEC 15948, 11.3.4.3).
const (
	svgMark  = "<!--written by stanchion-->"
	pngMark  = "Software\x00stanchion"
	pngFirst = 8 + 25 // bytes of the signature and of the first chunk, the header
)

// marked puts the mark into a picture.
func marked(picture []byte, format string) []byte {
	at, mark := pngFirst, chunk("tEXt", pngMark)
	if format == "svg" {
		at, mark = bytes.IndexByte(picture, '\n'), []byte(svgMark)
	}
	if at < 0 || at > len(picture) {
		return picture
	}
	return bytes.Join([][]byte{picture[:at], mark, picture[at:]}, nil)
}

// chunk returns a chunk of a PNG.
func chunk(kind, data string) []byte {
	c := binary.BigEndian.AppendUint32(nil, uint32(len(data)))
	c = append(c, kind+data...)
	return binary.BigEndian.AppendUint32(c, crc32.ChecksumIEEE([]byte(kind+data)))
}

// IsPicture reports whether a file that begins so is a picture of this package.
func IsPicture(begins []byte) bool {
	begins = begins[:min(len(begins), 256)]
	return bytes.HasPrefix(begins, []byte("<?xml")) && bytes.Contains(begins, []byte(svgMark)) ||
		bytes.HasPrefix(begins, []byte("\x89PNG")) && bytes.Contains(begins, []byte(pngMark))
}
