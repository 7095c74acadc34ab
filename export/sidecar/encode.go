package sidecar

import (
	"encoding"
	"encoding/json"
	"reflect"
	"slices"
	"strconv"
	"strings"
)

// encoder writes documents as json.MarshalIndent with two blanks does, byte for
// byte, in one pass into a buffer. What it does not know it leaves to that function.
type encoder struct {
	buf   []byte
	depth int
	known map[reflect.Type]*form
}

// form says how the values of a type are written.
type form struct {
	foreign bool // left to encoding/json
	fields  []field
}

// field is a member of a struct.
type field struct {
	index     int
	key       string // quoted, with colon and blank
	omitEmpty bool
}

// form looks at a type once.
func (e *encoder) form(t reflect.Type) *form {
	f, seen := e.known[t]
	if !seen {
		f = newForm(t)
		e.known[t] = f
	}
	return f
}

func newForm(t reflect.Type) *form {
	f := new(form)
	if t.Implements(reflect.TypeFor[json.Marshaler]()) || t.Implements(reflect.TypeFor[encoding.TextMarshaler]()) {
		f.foreign = true
		return f
	}
	if t.Kind() != reflect.Struct {
		return f
	}
	f.fields = make([]field, 0, t.NumField())
	for i := range t.NumField() {
		part := t.Field(i)
		name, option, _ := strings.Cut(part.Tag.Get("json"), ",")
		if part.Anonymous || !part.IsExported() || name == "" || name == "-" || option != "" && option != "omitempty" {
			f.foreign = true
			break
		}
		f.fields = append(f.fields, field{index: i, key: `"` + name + `": `, omitEmpty: option == "omitempty"})
	}
	return f
}

// value writes any value.
func (e *encoder) value(v reflect.Value) error {
	switch v.Kind() {
	case reflect.Invalid:
		e.buf = append(e.buf, "null"...)
		return nil
	case reflect.Interface:
		return e.value(v.Elem())
	}
	switch v.Type() {
	case reflect.TypeFor[string]():
		return e.text(v.String())
	case reflect.TypeFor[Decimal]():
		var err error
		e.buf, err = Decimal(v.Float()).append(e.buf)
		return err
	}
	f := e.form(v.Type())
	if f.foreign {
		return e.foreign(v)
	}
	switch v.Kind() {
	case reflect.String:
		return e.text(v.String())
	case reflect.Bool:
		e.buf = strconv.AppendBool(e.buf, v.Bool())
	case reflect.Int:
		e.buf = strconv.AppendInt(e.buf, v.Int(), 10)
	case reflect.Pointer:
		return e.value(v.Elem())
	case reflect.Struct:
		return e.object(v, f.fields)
	case reflect.Map:
		return e.table(v)
	case reflect.Slice:
		return e.list(v)
	default:
		return e.foreign(v)
	}
	return nil
}

// object writes a struct.
func (e *encoder) object(v reflect.Value, fields []field) error {
	e.open('{')
	for _, f := range fields {
		member := v.Field(f.index)
		if f.omitEmpty && empty(member) {
			continue
		}
		e.item()
		e.buf = append(e.buf, f.key...)
		if err := e.value(member); err != nil {
			return err
		}
	}
	e.shut('}')
	return nil
}

// empty is what omitempty leaves out.
func empty(v reflect.Value) bool {
	switch v.Kind() {
	case reflect.Map, reflect.Slice, reflect.String, reflect.Array:
		return v.Len() == 0
	case reflect.Struct:
		return false
	}
	return v.IsZero()
}

// table writes a map in the order of its keys.
func (e *encoder) table(v reflect.Value) error {
	if v.Type().Key().Kind() != reflect.String || e.form(v.Type().Key()).foreign {
		return e.foreign(v)
	}
	if v.IsNil() {
		e.buf = append(e.buf, "null"...)
		return nil
	}
	type entry struct {
		key   string
		value reflect.Value
	}
	entries := make([]entry, 0, v.Len())
	if plain, ok := v.Interface().(map[string]any); ok { // most, and cheaper
		for key, value := range plain {
			entries = append(entries, entry{key, reflect.ValueOf(value)})
		}
	} else {
		for each := v.MapRange(); each.Next(); {
			entries = append(entries, entry{each.Key().String(), each.Value()})
		}
	}
	slices.SortFunc(entries, func(a, b entry) int { return strings.Compare(a.key, b.key) })
	e.open('{')
	for _, each := range entries {
		e.item()
		if err := e.text(each.key); err != nil {
			return err
		}
		e.buf = append(e.buf, ": "...)
		if err := e.value(each.value); err != nil {
			return err
		}
	}
	e.shut('}')
	return nil
}

// list writes a slice.
func (e *encoder) list(v reflect.Value) error {
	if v.Type().Elem().Kind() == reflect.Uint8 {
		return e.foreign(v)
	}
	if v.IsNil() {
		e.buf = append(e.buf, "null"...)
		return nil
	}
	e.open('[')
	for i := range v.Len() {
		e.item()
		if err := e.value(v.Index(i)); err != nil {
			return err
		}
	}
	e.shut(']')
	return nil
}

// text writes a string; those with characters that may need an escape are foreign.
func (e *encoder) text(s string) error {
	for i := range len(s) {
		if c := s[i]; c < ' ' || c > '~' || c == '"' || c == '\\' || c == '<' || c == '>' || c == '&' {
			return e.foreign(reflect.ValueOf(s))
		}
	}
	e.buf = append(append(append(e.buf, '"'), s...), '"')
	return nil
}

// foreign leaves a value to encoding/json.
func (e *encoder) foreign(v reflect.Value) error {
	text, err := json.MarshalIndent(v.Interface(), strings.Repeat(indent, e.depth), indent)
	e.buf = append(e.buf, text...)
	return err
}

// indent is what a level is moved in by.
const indent = "  "

// open begins an object or a list.
func (e *encoder) open(bracket byte) {
	e.buf = append(e.buf, bracket)
	e.depth++
}

// item begins a line for the next member.
func (e *encoder) item() {
	if last := e.buf[len(e.buf)-1]; last != '{' && last != '[' {
		e.buf = append(e.buf, ',')
	}
	e.line()
}

// shut ends an object or a list, on the same line where it is empty.
func (e *encoder) shut(bracket byte) {
	e.depth--
	if last := e.buf[len(e.buf)-1]; last != '{' && last != '[' {
		e.line()
	}
	e.buf = append(e.buf, bracket)
}

// line begins a line.
func (e *encoder) line() {
	e.buf = append(e.buf, '\n')
	for range e.depth {
		e.buf = append(e.buf, indent...)
	}
}
