package circuit

import "slices"

// LetterEdition is the edition of the standard that the class letters follow: its main
// classes, one letter each. From memory: the text of this edition was not seen. Of the
// edition of 2019 the letters B, C, E, F, G and K were seen with their meaning; they
// agree but for the battery, which stores and so would be C there.
const LetterEdition = "IEC 81346-2:2009"

// Class is one class letter with what its parts are there for, in this project's words.
type Class struct{ Letter, Purpose string }

// Classes are the letters in use, in their order. W stands for cables, whose labels are
// given with the conductors.
var Classes = []Class{
	{"B", "senses: turns what it meets into a signal"},
	{"C", "stores a charge"},
	{"E", "gives light"},
	{"F", "protects by itself"},
	{"G", "gives energy"},
	{"K", "processes signals"},
	{"P", "shows or reads out"},
	{"Q", "switches or varies a flow of energy"},
	{"R", "limits or steadies"},
	{"S", "takes an order by hand"},
	{"T", "converts energy and keeps its kind"},
	{"W", "leads from place to place"},
	{"X", "connects"},
}

// Kinds are all part kinds, in the order of their constants.
var Kinds = []Kind{
	Fuse, Battery, Supply, ChargerUnit, Transformer, Bridge, Regulator, Resistor, Preset, Potentiometer, Capacitor, Electrolytic,
	Diode, Schottky, Zener, LED, Suppressor, NPN, PNP, Comparator, LDR, NTC, PhotoSwitch, CutOff, Relay, SwitchIsolator, PushButton,
	SignalLamp, Voltmeter, Ammeter, Shunt, Terminal, BusBar, LuminaireLamp, MainsConnection,
}

// KindsOf are the part kinds that bear a letter.
func KindsOf(letter string) []Kind {
	return slices.DeleteFunc(slices.Clone(Kinds), func(k Kind) bool { return k.Letter() != letter })
}
