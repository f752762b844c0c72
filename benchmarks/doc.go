// Package benchmarks measures dosewright beside plain Go and beside an
// expression library for general purposes, which knows no units. It is a module
// of its own, so that nothing it needs becomes a dependency.
//
//	go test -bench . -benchtime 1s
package benchmarks
