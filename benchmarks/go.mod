module example.com/dosewright/benchmarks

go 1.25.0

require (
	example.com/dosewright v0.0.0
	github.com/expr-lang/expr v1.17.8
)

require (
	github.com/martinlindhe/unit v0.0.0-20230420213220-4adfd7d0a0d6 // indirect
	gonum.org/v1/gonum v0.17.0 // indirect
)

replace example.com/dosewright => ../
