package schematic

func (b *book) planOverview() []string { return []string{"Overview"} }
func (b *book) drawOverview(sh *Sheet, i int) error { return nil }
