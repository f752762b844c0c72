// Command pack writes the published element tables in the compact form that
// package euv embeds; SOURCES.txt beside the result says where they are from
// and how they are laid out.
//
//	go run ./euv/tables/pack testdata/elements.csv testdata/atomic-scattering-factors.csv > euv/tables/elements.bin
package main

import (
	"bufio"
	"encoding/binary"
	"encoding/csv"
	"fmt"
	"io"
	"os"
	"strconv"
	"strings"
)

func main() {
	if err := run(os.Args[1:], os.Stdout); err != nil {
		fmt.Fprintln(os.Stderr, err)
		os.Exit(1)
	}
}

func run(args []string, out io.Writer) error {
	if len(args) != 2 {
		return fmt.Errorf("two files are needed: elements and scattering factors")
	}
	elements, err := rows(args[0], "symbol,Z,atomic_weight,density_g_cm3,state")
	if err != nil {
		return err
	}
	factors, err := rows(args[1], "symbol,energy_eV,f1,f2")
	if err != nil {
		return err
	}
	w := bufio.NewWriter(out)
	packed, err := pack(elements, factors)
	if err == nil {
		_, err = w.Write(packed)
	}
	if err != nil {
		return err
	}
	return w.Flush()
}

// rows reads a table and checks its head.
func rows(name, head string) ([][]string, error) {
	f, err := os.Open(name)
	if err != nil {
		return nil, err
	}
	defer f.Close()
	all, err := csv.NewReader(f).ReadAll()
	if err != nil {
		return nil, err
	}
	if len(all) == 0 || strings.Join(all[0], ",") != head {
		return nil, fmt.Errorf("%s: the head must be %s", name, head)
	}
	return all[1:], nil
}

// pack lays out one record for every symbol that either table has, in the
// order of the tables.
func pack(elements, factors [][]string) ([]byte, error) {
	facts, points := map[string][]string{}, map[string][][]string{}
	var order []string
	note := func(symbol string) {
		if facts[symbol] == nil && points[symbol] == nil {
			order = append(order, symbol)
		}
	}
	for _, row := range elements {
		note(row[0])
		facts[row[0]] = row
	}
	for _, row := range factors {
		note(row[0])
		points[row[0]] = append(points[row[0]], row)
	}
	var out []byte
	for _, symbol := range order {
		record, err := element(symbol, facts[symbol], points[symbol])
		if err != nil {
			return nil, fmt.Errorf("%s: %w", symbol, err)
		}
		out = append(out, record...)
	}
	return out, nil
}

// element is one record: symbol, state, weight, density, the length of the
// points in bytes, the points.
func element(symbol string, facts []string, points [][]string) ([]byte, error) {
	var body []byte
	for _, row := range points {
		var err error
		for _, text := range row[1:] {
			if body, err = decimal(body, text); err != nil {
				return nil, err
			}
		}
	}
	if facts == nil {
		facts = []string{symbol, "0", "0", "0", "unknown"}
	}
	out := append([]byte{byte(len(symbol))}, symbol...)
	of, known := states[facts[4]]
	if !known {
		return nil, fmt.Errorf("unknown state %q", facts[4])
	}
	out = append(out, of)
	var err error
	for _, text := range facts[2:4] {
		if out, err = decimal(out, text); err != nil {
			return nil, err
		}
	}
	return append(binary.AppendUvarint(out, uint64(len(body))), body...), nil
}

// states are the bytes for the state that a density is of.
var states = map[string]byte{
	"unknown":                             0,
	"solid":                               1,
	"liquid at or near its boiling point": 2,
	"liquid at room temperature":          3,
}

// decimal appends a decimal number as its whole digits, zigzag, times 16 plus
// the number of decimals: what is read back is the nearest float64 to the
// printed decimal.
func decimal(out []byte, text string) ([]byte, error) {
	mantissa, exponent, _ := strings.Cut(text, "E")
	whole, fraction, _ := strings.Cut(mantissa, ".")
	shift := 0
	if exponent != "" {
		var err error
		if shift, err = strconv.Atoi(exponent); err != nil {
			return nil, err
		}
	}
	digits, err := strconv.ParseInt(whole+fraction, 10, 48)
	places := len(fraction) - shift
	if err != nil || places < 0 || places > 15 {
		return nil, fmt.Errorf("%q does not fit the packed form (%v)", text, err)
	}
	return binary.AppendUvarint(out, uint64(digits<<1^digits>>63)<<4|uint64(places)), nil
}
