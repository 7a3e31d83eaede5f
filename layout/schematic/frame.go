package schematic

// drawFrame draws frame, zones and title block.
func (s *Sheet) drawFrame(p *painter, o Options) {}
