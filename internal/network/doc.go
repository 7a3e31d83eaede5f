// Package network finds the direct-current operating point of an expanded site.
//
// It takes a circuit.Netlist, sets up the equations of modified nodal analysis
// (C.-W. Ho, A. E. Ruehli, P. A. Brennan, "The modified nodal approach to network
// analysis", IEEE Trans. Circuits and Systems, vol. 22, 1975) and solves them by
// Newton's method on a sparse LU factorisation. The unknowns are the voltages of
// all nets against net 0, which is L−, and the current through every part whose
// law is written with a resistance: conductors, fuses, contacts, sources.
//
//	n, err := network.New(netlist)
//	sol, err := n.Solve(network.Environment{Mains: 1, Lux: 200, Charge: network.Float}, nil)
//	fmt.Println(sol.Volts[net], sol.Current("-K1/coil"))
//
// Relays, cut-offs, twilight switches and comparators have memory: Solve starts
// from the positions it is given and moves them until all of them agree with the
// voltages they see. Solving the next condition from the State of the one before
// is what makes hysteresis come out right.
//
// Every net has an insulation resistance of 1 TΩ to net 0. It carries less than
// 0.1 nA at extra-low voltage and gives a net behind an open contact the 0 V that
// a meter would show there.
//
// Every solution has been checked: the currents at every net sum to less than
// MaxResidual, or Solve returns an error instead.
package network
