package schematic

// Weights of a sheet break, in the measure of one cut lead.
const (
	costSheet = 8.0 // every sheet
	costSlack = 4.0 // times the square of the room left over, but for the last sheet
	costGroup = 6.0 // a break inside a group
	costCut   = 1.0 // each lead cut that is not a rail
)

// breakUp cuts n units in their order into sheets by dynamic programming: cost
// tells what a sheet of units i to j costs, and whether it can be drawn. It returns
// the first unit of every sheet.
func breakUp(n int, cost func(i, j int) (float64, bool)) []int {
	best := make([]float64, n+1)
	from := make([]int, n+1)
	for j := 1; j <= n; j++ {
		from[j] = -1
		for i := j - 1; i >= 0; i-- {
			if from[i] < 0 && i > 0 {
				continue
			}
			c, ok := cost(i, j)
			if !ok {
				continue
			}
			if from[j] < 0 || best[i]+c < best[j] {
				best[j], from[j] = best[i]+c, i
			}
		}
	}
	if n == 0 || from[n] < 0 {
		return nil
	}
	var out []int
	for j := n; j > 0; j = from[j] {
		out = append([]int{from[j]}, out...)
	}
	return out
}
