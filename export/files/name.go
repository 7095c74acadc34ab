package files

import (
	"fmt"
	"strings"
	"unicode"
	"unicode/utf8"
)

// longestName is the most bytes a name may have: common file systems take 255.
const longestName = 255

// CheckName refuses a name that is not that of a plain file in a folder, on any of
// the common systems: folders, drives and streams (/ \ :), wildcards and quotes,
// characters that do not print, a leading dot, a dot or blank at the end, names of
// devices, names above 255 bytes. The error is a *Error of RulePortable.
func CheckName(name string) error {
	if why := nameFault(name); why != "" {
		return &Error{Rule: RulePortable, Path: name, Other: why}
	}
	return nil
}

// nameFault says what is wrong with a name, "" if nothing is.
func nameFault(name string) string {
	switch {
	case name == "":
		return "it is empty"
	case len(name) > longestName:
		return fmt.Sprintf("it has %d bytes, and %d are the most", len(name), longestName)
	case !utf8.ValidString(name):
		return "it is not UTF-8"
	case name[0] == '.' || name[0] == ' ':
		return "it begins with a dot or a blank"
	case strings.HasSuffix(name, ".") || strings.HasSuffix(name, " "):
		return "it ends in a dot or a blank"
	}
	for _, r := range name {
		if strings.ContainsRune(`/\:*?"<>|`, r) {
			return fmt.Sprintf("%q cannot stand in it", r)
		}
		if !unicode.IsPrint(r) {
			return fmt.Sprintf("the character U+%04X cannot stand in it", r)
		}
	}
	stem, _, _ := strings.Cut(name, ".")
	if stem = strings.TrimRight(stem, " "); device(stem) {
		return fmt.Sprintf("%s is the name of a device", stem)
	}
	return ""
}

// device says whether Windows takes a name for that of a device, in any case and
// with any ending ("Naming Files, Paths, and Namespaces", Microsoft).
func device(stem string) bool {
	switch s := strings.ToUpper(stem); s {
	case "CON", "PRN", "AUX", "NUL", "CONIN$", "CONOUT$":
		return true
	default:
		port, ok := strings.CutPrefix(s, "COM")
		if !ok {
			port, ok = strings.CutPrefix(s, "LPT")
		}
		return ok && utf8.RuneCountInString(port) == 1 && strings.Contains("0123456789¹²³", port)
	}
}
