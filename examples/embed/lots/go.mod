module example.com/dosewright/examples/embed/lots

go 1.25.0

require example.com/dosewright v0.0.0

require (
	github.com/martinlindhe/unit v0.0.0-20230420213220-4adfd7d0a0d6 // indirect
	gonum.org/v1/gonum v0.17.0 // indirect
)

replace example.com/dosewright => ../../..
