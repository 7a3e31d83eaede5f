// Package endurance follows a battery hour by hour: an outage until the lights go out,
// the recharge after it, a week of both.
//
// # Method
//
// Capacity against rate comes from the class's table, or the user's own. A current i
// empties a full cell in the time T(i) that the table gives; a current that changes
// uses the cell up at the rate 1/T(i), so that it is empty when ∫ dt/T(i) reaches 1.
// With T(i) ∝ i^-k this is Peukert's law (W. Peukert, Elektrotechnische Zeitschrift 20
// (1897) 287; from memory); the table in place of one exponent makes a constant current
// reproduce the table itself.
//
// Temperature and age scale the capacity: rated capacity × share left by age ÷ size
// factor of IEEE 485 table 1 (lead-acid) or the class's own, and with it the currents
// that the table is entered with and, inversely, the internal resistance.
//
// The terminal voltage under load is Shepherd's equation (A. E. Shepherd, Journal of the
// Electrochemical Society 112 (1965) 657; from memory)
//
//	v = E(s) − R i − K i D / (1 + δ − D)
//
// with E the class's rest voltage at the state of charge s, R the internal resistance, D
// the part of the cell used up. K is fixed for each current by the table's end voltage,
// which the cell must show when D is 1; δ, the sharpness of the knee, by the class's
// table of capacity lost when the discharge stops higher. Shepherd's exponential first
// part, the surface charge after floating, is left out: the voltage starts lower than a
// battery just off float shows.
//
// While charging, the polarisation grows as the cell fills (Shepherd's term with the
// charge still out in the denominator, as O. Tremblay and L.-A. Dessaint, World Electric
// Vehicle Journal 3 (2009) 289, write it; from memory)
//
//	v = E(s) + R i + P i / q
//
// where q is the charge still to be returned, charge factor included, and P is set by
// the ampere-hour law: at the class's boost voltage the cell takes as many amperes as
// ampere-hours are out of it (G. W. Vinal, Storage Batteries, 4th edition 1955; from
// memory). The charger gives its rated current until its voltage is reached, boost
// first, then float.
//
// # Limits
//
// No recovery in pauses within an outage, no self-heating, no spread between cells, no
// surface charge. Currents above the table's shortest time follow Peukert's law from the
// two shortest, and the result says so; below the longest time no gain is counted. Real
// batteries of one class scatter by several parts in a hundred about their table.
package endurance
