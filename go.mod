module example.com/dosewright

go 1.25.0

require (
	github.com/chzyer/readline v1.5.1
	github.com/martinlindhe/unit v0.0.0-20230420213220-4adfd7d0a0d6
	golang.org/x/sys v0.37.0
	golang.org/x/term v0.36.0
	gonum.org/v1/gonum v0.17.0
)
