// Package sizing holds the program's methods of computation: pure functions, one
// published method in a file, each with its source. A function takes a plain struct
// of quantities and returns its result with a Working: formula, numbers put in,
// value, source. Nothing here knows of descriptions, circuits or documents.
//
// The methods, in the order in which a system is sized:
//
//   - conductors: Loop, Ampacity, LeastArea, and Tree for all sizes of a board at once
//   - protection: ChooseFuse, Coordinate, Adiabatic, Prospective, LeastFault, Breaking,
//     OpeningTime, CurrentToOpen, Discriminate
//   - battery: Sectional, NextCapacity, Internal, EndOfDischarge, CutOff, StandingTime
//   - charging: ChargerCurrent, ChargeVoltage, SetResistors, LinearCharger, HeatSink,
//     Peak, Ripple, TransformerRating, SupplyCurrent, Ventilation
//   - control: CoilPickUp, CoilDropper, ContactLoad, Suppression, TwilightCard,
//     CoilDriverResistors, FollowerPhotocell
//   - lamps: StringResistor
//
// When nothing fits, a function returns a *BlockedError that names the limit in the
// way and the smallest change that frees it. A table that does not reach far enough
// gives an *UnknownError: the program says that it does not know.
package sizing
