package export

// Cautions are the fixed words that go with every part.
func Cautions() []string {
	return []string{
		"Geometry only: load capacity, life, material, heat treatment and lubrication are not rated. Have a licensed or otherwise qualified engineer judge parts whose failure can hurt someone.",
		"Rotating gears draw in fingers, hair and clothing: guard the mesh and follow the machinery safety rules of your country.",
		"Cut edges and tooth tips are sharp: deburr before handling and wear gloves.",
		"Check one size of the drawing after import, and inspect the first part against the dimensions here before it runs.",
	}
}
