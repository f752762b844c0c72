package repl

import (
	"maps"
	"slices"
	"strings"
	"sync"

	"example.com/dosewright/repl/internal/program"
)

// catalogue holds every function of the language by its name.
var catalogue = sync.OnceValue(func() map[string]*program.Function {
	rows := map[string]*program.Function{}
	for _, f := range mathsFunctions() {
		rows[f.Name] = f
	}
	for _, section := range [][]Function{
		photonRows(), bodyRows(), peakRows(), distributionRows(), mirrorRows(), chainRows(), sourceRows(), exposureRows(),
		resistRows(), statisticsRows(), imagingRows(), maskRows(),
	} {
		for _, f := range section {
			rows[f.row.Name] = f.row
		}
	}
	return rows
})

// functionsByName lists the functions of the session in alphabetical order.
func (s *Session) functionsByName() []*program.Function {
	list := slices.Collect(maps.Values(s.rows))
	slices.SortFunc(list, func(a, b *program.Function) int { return strings.Compare(a.Name, b.Name) })
	return list
}

const (
	electricCaution = "Planning arithmetic only: site rules, the applicable codes and licensed practice govern electrical power."
	laserCaution    = "Planning arithmetic only: site rules, IEC 60825-1 and licensed practice govern laser work."
	heatCaution     = "Planning arithmetic only: site rules, the applicable codes and licensed practice govern cooling and heat loads."
)
