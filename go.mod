module example.com/dosewright

go 1.25.0

require (
	github.com/chzyer/readline v1.5.1 // indirect
	github.com/martinlindhe/unit v0.0.0-20230420213220-4adfd7d0a0d6 // indirect
	golang.org/x/sys v0.37.0 // indirect
	golang.org/x/term v0.36.0 // indirect
	gonum.org/v1/gonum v0.17.0 // indirect
)
