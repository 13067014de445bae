package markup

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestTree(t *testing.T) {
	doc := []byte(`<?xml version="1.0"?><x:w a="1"><x:s n="é &amp; x"/><x:d><x:n>a &lt; b</x:n></x:d><x:s/></x:w>`)
	root, err := Parse(doc)
	require.NoError(t, err)
	assert.Equal(t, "w", root.Name)
	assert.Equal(t, "x:", root.Prefix)
	assert.Len(t, root.All("s"), 2)
	assert.Equal(t, "é & x", root.Child("s").Attr("n"))
	assert.Equal(t, "a < b", root.Child("d").Child("n").Text())
	assert.Nil(t, root.Child("no").Child("no"))
	assert.Equal(t, "", root.Child("no").Attr("x"))
	assert.True(t, root.Child("s").HasAttr("n"))
	assert.Equal(t, `<x:n>a &lt; b</x:n>`, string(root.Child("d").Content()))
}

func TestEdits(t *testing.T) {
	doc := []byte(`<w><a/><b x='1' y="2"></b><c>t</c></w>`)
	root, err := Parse(doc)
	require.NoError(t, err)
	var e Edits
	e.Append(root, "<z/>")
	e.AppendWith(root.Child("a"), "<n/>", "count", "1")
	e.SetAttrs(root.Child("b"), "x", `3<"`, "y", "", "v", "4")
	e.Remove(root.Child("c"))
	e.Insert(root.Child("c").From, "<i/>")
	e.Append(root, "<zz/>")
	assert.Equal(t, `<w><a count="1"><n/></a><b x='3&lt;&quot;' v="4"></b><i/><z/><zz/></w>`, string(e.Apply(doc)))
	assert.Equal(t, string(doc), string(Edits(nil).Apply(doc)))
}

func TestSetAttrs(t *testing.T) {
	assert.Equal(t, `<a b="1"/>`, SetAttrs([]byte(`<a />`), "b", "1"))
	assert.Equal(t, `<a bb="1" b="2">`, SetAttrs([]byte(`<a bb="1" b="0">`), "b", "2"))
	assert.Equal(t, `<a bb="b"/>`, SetAttrs([]byte(`<a bb="b" b="0"/>`), "b", ""))
	assert.Equal(t, `<a bb="b" q="1"/>`, SetAttrs([]byte(`<a b="0" bb="b" q="1"/>`), "b", ""))
}
