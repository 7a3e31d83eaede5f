package symbols

// All is every symbol of the catalogue, in the order of the legend: by family,
// the blocks of six modules after those of four.
func All() []*Symbol {
	return []*Symbol{
		&Resistor, &ResistorAdjustable, &ResistorPreset, &Potentiometer, &PotentiometerPreset, &LDR, &NTC, &Varistor,
		&Capacitor, &CapacitorPolarised, &Inductor, &InductorCore, &Transformer,
		&Diode, &Zener, &Schottky, &LED, &SuppressorDiode, &NPN, &PNP, &NMOS, &PMOS,
		&Regulator3, &Comparator, &OpAmp, &ACDC, &DCDC, &Bridge, &Photoswitch,
		&RegulatorLarge, &ComparatorLarge, &PhotoswitchLarge, &UndervoltageRelease,
		&Cell, &Battery,
		&Fuse, &FuseSwitchDisconnector, &CircuitBreaker, &Disconnector, &SwitchDisconnector, &MakeContact, &BreakContact,
		&ChangeoverContact, &PushButtonMake, &PushButtonBreak, &ManualSwitch, &LatchingSwitch,
		&Coil, &CoilAttached, &CoilOnDelay, &CoilOffDelay, &MakeContactOnDelay,
		&Lamp, &SignalLamp, &LuminaireTube, &Buzzer, &Voltmeter, &Ammeter, &Shunt,
		&Terminal, &TerminalStrip, &Plug, &Socket, &ConnectorPair, &Junction, &DoubleJunction, &Crossing,
		&Earth, &EarthFunctional, &EarthProtective, &Frame, &TestPoint,
		&CableOval, &ScreenedCable, &ReferenceLeaving, &ReferenceArriving,
	}
}

// ByID is the symbol of the catalogue with the given ID, or nil.
func ByID(id string) *Symbol {
	for _, s := range All() {
		if s.ID == id {
			return s
		}
	}
	return nil
}
