package project

import "math/bits"

// bitset is a set of sizes.
type bitset []uint64

func newBitset(m int) bitset { return make(bitset, (m+63)/64) }

func (b bitset) has(j int32) bool { return b[j/64]>>(j%64)&1 == 1 }

func (b bitset) add(j int32) { b[j/64] |= 1 << (j % 64) }

func (b bitset) join(o bitset) {
	for i, w := range o {
		b[i] |= w
	}
}

func (b bitset) count() int {
	n := 0
	for _, w := range b {
		n += bits.OnesCount64(w)
	}
	return n
}

func (b bitset) within(o bitset) bool {
	for i, w := range b {
		if w&^o[i] != 0 {
			return false
		}
	}
	return true
}

func (b bitset) meets(o bitset) bool {
	for i, w := range b {
		if w&o[i] != 0 {
			return true
		}
	}
	return false
}
