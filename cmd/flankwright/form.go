package main

import (
	"slices"

	"flankwright/export"
	"flankwright/export/dxf"
	"flankwright/export/sidecar"
)

// form is one kind of part: a command of its own, and a form of rows in a table.
type form struct {
	name       string
	parameters func() []parameter
	resolve    func(request) (job, error)
	// suffixes tell the drawings of one product apart, behind a row's name.
	suffixes []string
}

// job is a request put into numbers, ready to be made.
type job interface {
	// normalized is the request as the sidecar keeps it.
	normalized() map[string]any
	make() (product, error)
}

// product is what a job makes, ready to be written.
type product interface {
	document() *sidecar.Document
	sheets() []sheetOf
}

// sheetOf is one drawing, with how it is written as DXF.
type sheetOf struct {
	drawing export.Drawing
	dxf     dxf.Options
}

// pairForm is the name of a pair in a table.
const pairForm = "pair"

// forms are the kinds of part that there are.
func forms() []form {
	resolve := func(r request) (job, error) { return resolvePart(r) }
	var list []form
	for _, name := range []string{"gear", "ring", "rack"} {
		list = append(list, form{name, func() []parameter { return partParameters(name) }, resolve, []string{""}})
	}
	return append(list, form{pairForm, pairParameters, func(r request) (job, error) { return resolvePair(r) }, []string{"-1", "-2", "-assembly"}})
}

// partForms are the forms that are one part each.
func partForms() []string {
	return slices.DeleteFunc(formNames(), func(name string) bool { return name == pairForm })
}

// formNames are the names of all forms.
func formNames() []string {
	var names []string
	for _, f := range forms() {
		names = append(names, f.name)
	}
	return names
}

// flags are the flags of the form that say what is made.
func (f form) flags() map[string]bool {
	flags := map[string]bool{}
	for _, p := range f.parameters() {
		if !p.transient {
			flags[p.name] = true
		}
	}
	return flags
}
