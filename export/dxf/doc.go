// Package dxf writes a drawing as an ASCII DXF file that importers take without
// repair: AC1015 (R2000) with the full container, or AC1009 (R12).
//
// Marshal runs in this order:
//
//	sheet.New   scale to the unit of the file, round to nine decimals, check
//	document    tables, blocks and objects with their handles
//	entities    one closed LWPOLYLINE or CIRCLE for each loop, or single pieces
//	encoder     the bytes
//
// Table records, lines, circles, arcs and splines are those of
// github.com/yofu/dxf. Its document layer is not used: that shares records
// between drawings and offers no choice of digits. Records it cannot express
// (owners of tables and blocks, polylines without an allocation a vertex, R12
// polylines) are types of this package with the same Format method.
//
// Nothing in the package outlives a call, so any number of goroutines may
// marshal at once and get the bytes a single one would.
package dxf
