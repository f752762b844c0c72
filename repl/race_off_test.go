//go:build !race

package repl_test

const raceDetected = false
