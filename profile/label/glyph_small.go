package label

// firstSmall draws a to m.
func firstSmall(c rune) glyph {
	const h, d = smallHeight, -descent
	switch c {
	case 'a':
		return glyph{0.46, []stroke{{
			{0.04, h, 0}, {0.46, h, 0.2}, {0.46, 0, 0}, {0, 0, 0.2}, {0, 0.4, 0.2}, {0.46, 0.4, 0},
		}}}
	case 'b':
		return glyph{0.5, []stroke{{{0, 1, 0}, {0, 0, 0}, {0.5, 0, 0.25}, {0.5, h, 0.25}, {0, h, 0}}}}
	case 'c':
		return glyph{0.46, []stroke{{{0.46, h, 0}, {0, h, 0.27}, {0, 0, 0.27}, {0.46, 0, 0}}}}
	case 'd':
		return glyph{0.5, []stroke{{{0.5, 1, 0}, {0.5, 0, 0}, {0, 0, 0.25}, {0, h, 0.25}, {0.5, h, 0}}}}
	case 'e':
		return glyph{0.5, []stroke{{
			{0, 0.36, 0}, {0.5, 0.36, 0}, {0.5, h, 0.24}, {0, h, 0.25}, {0, 0, 0.25}, {0.46, 0, 0},
		}}}
	case 'f':
		return glyph{0.4, []stroke{
			{{0.4, 1, 0}, {0.14, 1, 0.2}, {0.14, 0, 0}}, {{0, h, 0}, {0.36, h, 0}},
		}}
	case 'g':
		return glyph{0.5, []stroke{{
			{0.04, d, 0}, {0.5, d, 0.2}, {0.5, h, 0}, {0, h, 0.25}, {0, 0, 0.25}, {0.5, 0, 0},
		}}}
	case 'h':
		return glyph{0.5, []stroke{
			{{0, 1, 0}, {0, 0, 0}}, {{0, h, 0}, {0.5, h, 0.23}, {0.5, 0, 0}},
		}}
	case 'i':
		return glyph{0.1, []stroke{{{0.05, h, 0}, {0.05, 0, 0}}, {{0.05, 1, 0}, {0.05, 0.88, 0}}}}
	case 'j':
		return glyph{0.25, []stroke{
			{{0.2, h, 0}, {0.2, d, 0.2}, {0, d, 0}}, {{0.2, 1, 0}, {0.2, 0.88, 0}},
		}}
	case 'k':
		return glyph{0.48, []stroke{{{0, 1, 0}, {0, 0, 0}}, {{0.44, h, 0}, {0, 0.32, 0}, {0.48, 0, 0}}}}
	case 'l':
		return glyph{0.22, []stroke{{{0, 1, 0}, {0, 0, 0.16}, {0.22, 0, 0}}}}
	case 'm':
		return glyph{0.76, []stroke{
			{{0, 0, 0}, {0, h, 0}, {0.38, h, 0.19}, {0.38, 0, 0}},
			{{0.38, h - 0.19, 0}, {0.38, h, 0.19}, {0.76, h, 0.19}, {0.76, 0, 0}},
		}}
	}
	return glyph{}
}

// secondSmall draws n to z.
func secondSmall(c rune) glyph {
	const h, d = smallHeight, -descent
	switch c {
	case 'n':
		return glyph{0.5, []stroke{{{0, 0, 0}, {0, h, 0}, {0.5, h, 0.23}, {0.5, 0, 0}}}}
	case 'o':
		return glyph{0.52, []stroke{{
			{0.26, h, 0}, {0, h, 0.26}, {0, 0, 0.26}, {0.52, 0, 0.26}, {0.52, h, 0.26}, {0.26, h, 0},
		}}}
	case 'p':
		return glyph{0.5, []stroke{{{0, d, 0}, {0, h, 0}, {0.5, h, 0.25}, {0.5, 0, 0.25}, {0, 0, 0}}}}
	case 'q':
		return glyph{0.5, []stroke{{{0.5, d, 0}, {0.5, h, 0}, {0, h, 0.25}, {0, 0, 0.25}, {0.5, 0, 0}}}}
	case 'r':
		return glyph{0.34, []stroke{{{0, 0, 0}, {0, h, 0}, {0.34, h, 0.17}, {0.34, 0.5, 0}}}}
	case 's':
		return glyph{0.46, []stroke{{
			{0.43, h, 0}, {0, h, 0.17}, {0.02, 0.36, 0.15}, {0.46, 0.36, 0.17}, {0.46, 0, 0.17}, {0.02, 0, 0},
		}}}
	case 't':
		return glyph{0.36, []stroke{
			{{0.13, 0.95, 0}, {0.13, 0, 0.18}, {0.36, 0, 0}}, {{0, h, 0}, {0.34, h, 0}},
		}}
	case 'u':
		return glyph{0.5, []stroke{{{0, h, 0}, {0, 0, 0.23}, {0.5, 0, 0}, {0.5, h, 0}}}}
	case 'v':
		return glyph{0.5, []stroke{{{0, h, 0}, {0.25, 0, 0}, {0.5, h, 0}}}}
	case 'w':
		return glyph{0.72, []stroke{{{0, h, 0}, {0.18, 0, 0}, {0.36, 0.6, 0}, {0.54, 0, 0}, {0.72, h, 0}}}}
	case 'x':
		return glyph{0.5, []stroke{{{0, h, 0}, {0.5, 0, 0}}, {{0, 0, 0}, {0.5, h, 0}}}}
	case 'y':
		return glyph{0.5, []stroke{{{0.5, h, 0}, {0.25 + 0.25*d/h, d, 0}}, {{0, h, 0}, {0.25, 0, 0}}}}
	case 'z':
		return glyph{0.46, []stroke{{{0, h, 0}, {0.46, h, 0}, {0, 0, 0}, {0.46, 0, 0}}}}
	}
	return glyph{}
}
