package chart

import (
	"io"
	"testing"
)

func BenchmarkDraw(b *testing.B) {
	for _, name := range []string{"family5", "hill", "bell"} {
		p := samples()[name]
		for _, format := range []string{"svg", "png"} {
			b.Run(name+"/"+format, func(b *testing.B) {
				for b.Loop() {
					if err := Draw(p, format, io.Discard); err != nil {
						b.Fatal(err)
					}
				}
			})
		}
	}
}

func BenchmarkSketch(b *testing.B) {
	for _, name := range []string{"family5", "hill", "bell"} {
		p := samples()[name]
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				if lines := Sketch(p, 100); len(lines) < 10 {
					b.Fatal(lines)
				}
			}
		})
	}
}
