// Package catalogue holds the rolled and hollow sections that a column may be
// made of: their dimensions as the product standards print them, the section
// properties computed from those dimensions, and the reading of their names as
// the trade writes them.
//
// I and H sections and channels are those of EN 10365:2017, hollow sections
// those of EN 10210-2 (hot finished) and EN 10219-2 (cold formed), angles those
// of EN 10056-1:2017. The tables hold dimensions and nominal masses; every other
// property is computed, root fillets and corner radii included.
//
// Lengths are in mm, areas in mm2, second moments in mm4, warping constants in
// mm6, masses in kg/m. Axes are those of EN 1993-1-1: y-y major, z-z minor; for
// angles y-y is parallel to the shorter leg and z-z to the longer, with u-u and
// v-v the principal axes. A channel is symmetric about y-y.
//
// Areas and moduli are exact for the outline that the standards draw. Torsion
// constants follow the published expression of each family's own tables (El
// Darwish and Johnston for the UK families, channels and angles; the annexes of
// EN 10210-2 and EN 10219-2 for hollow sections); warping constants and shear
// centres those of thin-walled theory. The tests hold all of them against
// section tables, against the outline integrated as a polygon, and against a
// finite-element solution of torsion.
package catalogue
