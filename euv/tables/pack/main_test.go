package main

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

const (
	elementHead = "symbol,Z,atomic_weight,density_g_cm3,state\n"
	factorHead  = "symbol,energy_eV,f1,f2\n"
)

// What is embedded is what the published tables pack to.
func TestEmbeddedTablesAreCurrent(t *testing.T) {
	var out bytes.Buffer
	err := run([]string{"../../../testdata/elements.csv", "../../../testdata/atomic-scattering-factors.csv"}, &out)
	if err != nil {
		t.Fatal(err)
	}
	want, err := os.ReadFile("../elements.bin")
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(out.Bytes(), want) {
		t.Error("elements.bin is not what the tables pack to; run the command")
	}
}

// A bad table is refused, whole, with the element or the file it is about.
func TestBadTables(t *testing.T) {
	const h = "H,1,1.00794,0.0708,solid\n"
	for _, c := range []struct{ elements, factors, want string }{
		{"", factorHead, "head"},
		{"symbol,Z\n", factorHead, "head"},
		{elementHead + h, "energy,f1\n", "head"},
		{elementHead + "H,1,1.0\n", factorHead, "fields"},
		{elementHead + "H,1,one,0.07,solid\n", factorHead, "H: \"one\""},
		{elementHead + "H,1,1.0,0.07,plasma\n", factorHead, "H: unknown state"},
		{elementHead + h, factorHead + "H,24.9,-9999.,NaN\n", "H: \"NaN\""},
		{elementHead + h, factorHead + "H,24.9,,0.4\n", "H: \"\""},
		{elementHead + h, factorHead + "H,24.9,1e3x,0.4\n", "H: \"1e3x\""},
		{elementHead + h, factorHead + "H,123456789012345678,1,0.4\n", "H: "},
	} {
		dir := t.TempDir()
		paths := []string{filepath.Join(dir, "elements.csv"), filepath.Join(dir, "factors.csv")}
		for i, text := range []string{c.elements, c.factors} {
			if err := os.WriteFile(paths[i], []byte(text), 0o600); err != nil {
				t.Fatal(err)
			}
		}
		var out bytes.Buffer
		err := run(paths, &out)
		if err == nil || !strings.Contains(err.Error(), c.want) || out.Len() > 0 {
			t.Errorf("%q, %q: %v, %d bytes; want %q", c.elements, c.factors, err, out.Len(), c.want)
		}
	}
	if err := run(nil, &bytes.Buffer{}); err == nil {
		t.Error("no files are taken")
	}
}
