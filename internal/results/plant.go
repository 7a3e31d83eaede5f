package results

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/design"
)

type batteryEntry struct {
	Designation       string   `json:"designation"`
	Cells             string   `json:"cells"`
	Series            int      `json:"series"`
	Blocks            int      `json:"blocks"`
	Parallel          int      `json:"parallel"`
	BlockV            *float64 `json:"block_v"`
	CapacityAh        *float64 `json:"capacity_ah"`
	RatedH            *float64 `json:"rated_h"`
	RequiredAh        *float64 `json:"required_ah"`
	TemperatureFactor *float64 `json:"temperature_factor"`
	EndV              *float64 `json:"end_v"`
	FullV             *float64 `json:"full_v"`
	FloatV            *float64 `json:"float_v"`
	ProspectiveA      *float64 `json:"prospective_a"`
	ResistanceOhm     *float64 `json:"resistance_ohm"`
	VentilationM3H    *float64 `json:"ventilation_m3_h"`
	OpeningCM2        *float64 `json:"opening_cm2"`
	Pinned            bool     `json:"pinned"`
}

func battery(d *design.Design) *batteryEntry {
	b := d.Battery
	if b.Part == nil {
		return nil
	}
	return &batteryEntry{
		Designation: b.Part.Designation, Cells: b.Class, Series: b.Series, Blocks: b.Blocks, Parallel: b.Parallel, BlockV: figure(b.BlockVolt),
		CapacityAh: figure(b.Capacity), RatedH: positive(b.RatedHours), RequiredAh: figure(b.Required), TemperatureFactor: positive(b.TemperatureFactor),
		EndV: figure(b.EndVolt), FullV: figure(b.FullVolt), FloatV: figure(b.FloatVolt), ProspectiveA: figure(b.Prospective),
		ResistanceOhm: figure(b.Resistance), VentilationM3H: figure(b.Ventilation), OpeningCM2: figure(b.OpeningCM2), Pinned: b.Pinned,
	}
}

type chargerEntry struct {
	Designation string   `json:"designation"`
	CurrentA    *float64 `json:"current_a"`
	RequiredA   *float64 `json:"required_a"`
	LimitA      *float64 `json:"limit_a"`
	FloatV      *float64 `json:"float_v"`
	BoostV      *float64 `json:"boost_v"`
	StatedAtC   *float64 `json:"stated_at_c"`
	PerKelvinV  *float64 `json:"per_kelvin_v"`
	Compensated bool     `json:"compensated"`
	Pinned      bool     `json:"pinned"`
}

func charger(d *design.Design) *chargerEntry {
	c := d.Charger
	if c.Part == nil {
		return nil
	}
	e := &chargerEntry{
		Designation: c.Part.Designation, CurrentA: figure(c.Current), RequiredA: figure(c.Required), LimitA: positive(c.Limit),
		FloatV: figure(c.Float), BoostV: positive(c.Boost), PerKelvinV: figure(c.PerKelvin), Compensated: c.Compensated, Pinned: c.Pinned,
	}
	if class := catalogue.BatteryClassOf(d.Battery.Class); class != nil {
		e.StatedAtC = figure(class.ChargeAt)
	}
	return e
}

type cutOffEntry struct {
	Designation string   `json:"designation"`
	OpensV      *float64 `json:"opens_v"`
	AtBatteryV  *float64 `json:"at_battery_v"`
	ReclosesV   *float64 `json:"recloses_v"`
	CurrentA    *float64 `json:"current_a"`
	RatedA      *float64 `json:"rated_a"`
}

func cutOff(d *design.Design) *cutOffEntry {
	c := d.CutOff
	if c == nil {
		return nil
	}
	return &cutOffEntry{
		Designation: c.Part.Designation, OpensV: figure(c.Opens), AtBatteryV: positive(c.AtBattery), ReclosesV: figure(c.Recloses),
		CurrentA: figure(c.Current), RatedA: figure(c.Rated),
	}
}

type relayEntry struct {
	Designation string   `json:"designation"`
	CoilOhm     *float64 `json:"coil_ohm"`
	CoilA       *float64 `json:"coil_a"`
	PickUpV     *float64 `json:"pick_up_v"`
	DropOutV    *float64 `json:"drop_out_v"`
	LowestFeedV *float64 `json:"lowest_feed_v"`
	PickUpColdV *float64 `json:"pick_up_cold_v"`
	LowestColdV *float64 `json:"lowest_cold_v"`
	ContactA    *float64 `json:"contact_a"`
	RatedA      *float64 `json:"rated_a"`
}

func relay(d *design.Design) *relayEntry {
	r := d.Relay
	if r == nil {
		return nil
	}
	return &relayEntry{
		Designation: r.Part.Designation, CoilOhm: figure(r.Coil), CoilA: figure(r.CoilA), PickUpV: figure(r.PickUp), DropOutV: figure(r.DropOut),
		LowestFeedV: figure(r.LowestFeed), PickUpColdV: positive(r.PickUpCold), LowestColdV: positive(r.LowestCold), ContactA: figure(r.Contact), RatedA: figure(r.Rated),
	}
}

type supplyEntry struct {
	Designation string   `json:"designation"`
	VoltV       *float64 `json:"volt_v"`
	RatedA      *float64 `json:"rated_a"`
	CurrentA    *float64 `json:"current_a"`
}

func supply(d *design.Design) *supplyEntry {
	s := d.Supply
	if s == nil || s.Part == nil {
		return nil
	}
	return &supplyEntry{Designation: s.Part.Designation, VoltV: figure(s.Volt), RatedA: figure(s.Rated), CurrentA: figure(s.Current)}
}

type totalsEntry struct {
	Luminaires int      `json:"luminaires"`
	LoadW      *float64 `json:"load_w"`
	LoadA      *float64 `json:"load_a"`
	CableM     *float64 `json:"cable_m"`
	CopperKg   *float64 `json:"copper_kg"`
	WorstDrop  *float64 `json:"worst_drop"`
	WorstLamp  string   `json:"worst_lamp"`
	LowestV    *float64 `json:"lowest_v"`
	Bound      *float64 `json:"bound"`
	Proven     bool     `json:"proven"`
}

func totals(d *design.Design) totalsEntry {
	t := d.Totals
	return totalsEntry{
		Luminaires: t.Luminaires, LoadW: figure(t.LoadWatt), LoadA: figure(t.LoadA), CableM: figure(t.CableM), CopperKg: figure(t.CopperKg),
		WorstDrop: figure(t.WorstDrop), WorstLamp: t.WorstLamp, LowestV: figure(t.LowestV), Bound: figure(t.Bound), Proven: t.Proven,
	}
}
