//go:build !race

package main

// raceDetector says that the race detector is on.
const raceDetector = false
