package repl

import "example.com/dosewright/euv"

// photonRows: photons, dose and shapes.
func photonRows() []Function {
	const section = "Photons and dose"
	exact := "exact SI constants (SI Brochure, 9th edition, table 1)"
	return []Function{
		Bind1(Row{
			Name: "photon_energy", Section: section, Summary: "energy of a photon of a vacuum wavelength",
			Args: []string{"wavelength"}, Formula: "E = h c / λ", Valid: "wavelength > 0", Source: exact,
			Example: "photon_energy(13.5 nm)",
		}, euv.PhotonEnergy),
		Bind1(Row{
			Name: "photon_wavelength", Section: section, Summary: "vacuum wavelength of a photon of an energy",
			Args: []string{"energy"}, Formula: "λ = h c / E", Valid: "energy > 0", Source: exact,
			Example: "photon_wavelength(92 eV)",
		}, euv.PhotonWavelength),
		Bind2(Row{
			Name: "photon_density", Section: section, Summary: "incident photons per area of a dose",
			Args: []string{"dose", "wavelength = 13.5 nm"}, Plane: "as dose", Formula: "D λ / (h c)", Valid: "dose ≥ 0", Source: exact,
			Example: "photon_density(30 mJ/cm^2)",
		}, euv.PhotonDensity),
		Bind3(Row{
			Name: "photon_count", Section: section, Summary: "incident photons of a dose on an area; their count scatters by its square root",
			Args: []string{"dose", "area", "wavelength = 13.5 nm"}, Plane: "as dose", Formula: "N = D A λ / (h c)", Valid: "dose ≥ 0, area > 0", Source: exact,
			Example: "photon_count(30 mJ/cm^2, area = 400 nm^2)",
		}, euv.PhotonCount),
		Bind2(Row{
			Name: "photon_rate", Section: section, Summary: "photons per time of a power",
			Args: []string{"power", "wavelength = 13.5 nm"}, Plane: "as power", Formula: "P λ / (h c)", Valid: "power ≥ 0", Source: exact,
			Example: "photon_rate(250 W at IF)",
		}, euv.PhotonRate),
		Bind2(Row{
			Name: "dose_of", Section: section, Summary: "dose that brings a number of photons per area",
			Args: []string{"photons_per_area", "wavelength = 13.5 nm"}, Plane: "as photons_per_area", Formula: "D = n h c / λ", Valid: "photons_per_area ≥ 0", Source: exact,
			Example: "dose_of(20 photon/nm^2)",
		}, euv.DoseOf),
		Bind1(Row{
			Name: "hole_area", Section: section, Summary: "area of a round hole",
			Args: []string{"diameter"}, Formula: "π d² / 4", Valid: "diameter > 0", Source: "geometry",
			Example: "hole_area(20 nm)",
		}, euv.HoleArea),
		Bind2(Row{
			Name: "rectangle_area", Section: section, Summary: "area of a rectangle",
			Args: []string{"width", "height"}, Formula: "w h", Valid: "sides > 0", Source: "geometry",
			Example: "rectangle_area(26 mm, 33 mm)",
		}, euv.RectangleArea),
		Bind2(Row{
			Name: "ellipse_area", Section: section, Summary: "area of an ellipse of two full axes",
			Args: []string{"a", "b"}, Formula: "π a b / 4", Valid: "axes > 0", Source: "geometry",
			Example: "ellipse_area(20 nm, 30 nm)",
		}, euv.EllipseArea),
	}
}
