package main

import (
	"fmt"
	"runtime"
	"runtime/debug"

	"github.com/spf13/cobra"
)

// version is raised with each release; see DEVELOPERS.md.
const version = "0.1.0"

// program is the program and its version, as sidecars name it.
func program() string { return "flankwright " + version }

func newVersion(io streams) *cobra.Command {
	return &cobra.Command{
		Use:   "version",
		Short: "Print the version",
		Args:  noArguments,
		RunE: func(*cobra.Command, []string) error {
			_, err := fmt.Fprintf(io.out, "flankwright %s%s, %s %s/%s\n", version, revision(), runtime.Version(), runtime.GOOS, runtime.GOARCH)
			return writeFailed("stdout", err)
		},
	}
}

// revision is the commit the program was built from, where the build says so.
func revision() string {
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return ""
	}
	for _, s := range info.Settings {
		if s.Key == "vcs.revision" && len(s.Value) >= 12 {
			return " (" + s.Value[:12] + ")"
		}
	}
	return ""
}
