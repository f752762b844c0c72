// Package units holds quantities with dimensions, for the arithmetic of
// lithography at 13.5 nm and around it.
//
// A Quantity is a value in SI units with a Dimension; counted things (wafer,
// field, die, pulse) are dimensions of their own, so that wafers per hour do
// not add to fields per hour. Typed quantities (Fluence, Power, Throughput, …)
// are plain float64 kinds for functions whose dimensions the Go compiler can
// hold. A System knows the words for units: it reads "30 mJ/cm^2" exactly and
// chooses the unit in which the trade states an answer.
package units
