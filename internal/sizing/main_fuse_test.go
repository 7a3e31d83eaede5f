package sizing

import (
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// mainInput is a 48 V system whose battery gives 40 A into a short at the boards: two
// sizes of cable with 10 mΩ and 5 mΩ. The fuse itself counts nothing.
func mainInput() MainFuseInput {
	return MainFuseInput{
		Classes: []*catalogue.FuseClass{catalogue.FuseBlade58, catalogue.FuseCylinder10, catalogue.FuseCylinder14, catalogue.FuseKnife},
		Stock:   func(c *catalogue.FuseClass) []quantity.Ampere { return c.Ratings },
		Load:    3, LoadFactor: 0.75, System: 59, Prospective: 60,
		Empty: 46, Internal: 46*0.95/40 - 0.01, Within: 5,
		Cables: []CableOption{
			{quantity.WireSize{Area: 2.5}, 24, 0.01}, {quantity.WireSize{Area: 6}, 41, 0.005},
		},
		Cold: func(quantity.Ampere) quantity.Ohm { return 0 }, Withstand: 115,
	}
}

// TestMainFuseByVoltage: above 58 V no blade fuse; the gG link of 4 A opens on 40 A
// within 5 s (18.5 A by the gate), one of 16 A would need 65 A.
func TestMainFuseByVoltage(t *testing.T) {
	m, err := ChooseMainFuse(mainInput())
	if err != nil || m.Class != catalogue.FuseCylinder10 || m.Rating != 4 || m.Cable.Size.Area != 2.5 {
		t.Errorf("%+v %v, want 4 A in 10 × 38 mm on 2.5 mm²", m, err)
	}
	in := mainInput()
	in.System = 57
	if m, err = ChooseMainFuse(in); err != nil || m.Class != catalogue.FuseBlade58 || m.Rating != 4 {
		t.Errorf("at 57 V: %+v %v", m, err)
	}
}

// TestMainFuseAbove: a rating above those behind is taken while it still opens in time,
// else the one that only carries the load: 8 A opens on 35.2 A, 10 A on 46.5 A.
func TestMainFuseAbove(t *testing.T) {
	in := mainInput()
	in.Above = 6.4
	if m, err := ChooseMainFuse(in); err != nil || m.Rating != 8 || !m.OverSmaller {
		t.Errorf("6.4 A behind: %+v %v", m, err)
	}
	in.Above = 9.6
	if m, err := ChooseMainFuse(in); err != nil || m.Rating != 4 || m.OverSmaller {
		t.Errorf("9.6 A behind: %+v %v", m, err)
	}
}

// TestMainFuseThickerCable: just inside and outside of what the thin cable lets flow, and
// the I₂ rule: 12 A of conventional current 2.1 needs 17.4 A of cable.
func TestMainFuseThickerCable(t *testing.T) {
	in := mainInput()
	in.Pinned, in.Internal, in.Classes = 12, 0.1, in.Classes[1:2]
	in.Cables[0].Loop = quantity.Ohm(0.95*46/55.2) - 0.1
	if m, err := ChooseMainFuse(in); err != nil || m.Cable.Size.Area != 2.5 {
		t.Errorf("just enough: %+v %v", m, err)
	}
	in.Cables[0].Loop *= 1.001
	if m, err := ChooseMainFuse(in); err != nil || m.Cable.Size.Area != 6 {
		t.Errorf("just too little: %+v %v", m, err)
	}
	in.Cables[0].Loop, in.Cables[0].Ampacity = 0.01, 17.3
	if m, err := ChooseMainFuse(in); err != nil || m.Cable.Size.Area != 6 {
		t.Errorf("I₂: %+v %v", m, err)
	}
}

// TestMainFuseWithstand: k²S² of 0.75 mm² at 40 A is (115 × 0.75 ÷ 40)² = 4.65 s; 8 A
// opens later than that between 5 s at 35.2 A and 0.1 s at 92 A only below 36 A.
func TestMainFuseWithstand(t *testing.T) {
	in := mainInput()
	in.Pinned, in.Classes = 8, in.Classes[1:2]
	in.Cables[0] = CableOption{quantity.WireSize{Area: 0.5}, 12, 0.01}
	in.Internal = 46*0.95/35.3 - 0.01 // 35.3 A: about 4.9 s, 0.5 mm² stands 2.65 s
	if m, err := ChooseMainFuse(in); err != nil || m.Cable.Size.Area != 6 {
		t.Errorf("%+v %v, want the thick cable", m, err)
	}
}

// TestMainFuseBlocked: each limit is named, the nearest candidate comes with it.
func TestMainFuseBlocked(t *testing.T) {
	in := mainInput()
	in.Internal *= 3
	m, err := ChooseMainFuse(in)
	blocked(t, err, LimitClearing)
	if m.Rating != 4 {
		t.Errorf("nearest %+v", m)
	}
	in = mainInput()
	in.System = 260
	_, err = ChooseMainFuse(in)
	blocked(t, err, LimitVoltage)
	in = mainInput()
	in.Prospective = 30000
	_, err = ChooseMainFuse(in)
	blocked(t, err, LimitBreaking)
	in = mainInput()
	in.Load = 900
	_, err = ChooseMainFuse(in)
	blocked(t, err, LimitLoad)
}
