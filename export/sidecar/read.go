package sidecar

import (
	"encoding/json"
	"fmt"
)

// Read takes a document apart that Marshal wrote. Marshalling what it returns gives
// the same bytes.
func Read(data []byte) (*Document, error) {
	var d Document
	if err := json.Unmarshal(data, &d); err != nil {
		return nil, fmt.Errorf("not a sidecar: %w", err)
	}
	if d.Schema != SchemaID {
		return nil, fmt.Errorf("not a sidecar: its schema is %q, not %q", d.Schema, SchemaID)
	}
	for key, v := range d.Dimensions {
		d.Dimensions[key] = quantity(v)
	}
	for key, v := range d.BasicRack {
		d.BasicRack[key] = quantity(v)
	}
	for _, m := range d.Members {
		for key, v := range m.Dimensions {
			m.Dimensions[key] = quantity(v)
		}
		for key, v := range m.BasicRack {
			m.BasicRack[key] = quantity(v)
		}
	}
	for i := range d.Choices {
		d.Choices[i].Value = quantity(d.Choices[i].Value)
	}
	return &d, nil
}

// quantity gives a decoded value the type it had when it was written.
func quantity(v any) any {
	switch v := v.(type) {
	case float64:
		return Decimal(v)
	case map[string]any:
		number, isNumber := v["value"].(float64)
		unit, hasUnit := v["unit"].(string)
		symbol, hasSymbol := v["symbol"].(string)
		if isNumber && hasUnit && hasSymbol {
			return Value{Decimal(number), unit, symbol}
		}
	}
	return v
}
