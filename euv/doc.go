// Package euv is the physics of extreme-ultraviolet lithography as typed Go
// functions: photons and dose, mirrors from scattering tables and layers,
// chains of planes, source and electricity, exposure and throughput, resist and
// its statistics, imaging, mask and overlay.
//
// Quantities go in and come out as the types of package units, plain float64
// values in SI units. Errors are typed: *ArgumentError names the argument and
// the range; nothing that is not finite comes back without an error. Results
// that rest on a model or an extrapolation are Warned and carry their doubts.
// Every function is safe for concurrent use and does no input or output.
//
// Planning arithmetic only: nothing here sets an exposure limit, interlock or
// clearance; site rules, the applicable codes and licensed practice govern.
package euv
