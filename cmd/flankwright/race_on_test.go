//go:build race

package main

// raceDetector says that the race detector is on: it takes several times the memory, and
// processes of others gain nothing by it.
const raceDetector = true
