package main

import "gloamwright/internal/network"

// models writes the device models of the network, so that results.json can be solved
// again by other means.
func models() []byte {
	return []byte("# Device models\n\nThe laws by which the circuit is solved, written by the program. `results.json` lists every element with its model, its nets and its numbers under `network`; with\n`conditions` anyone can check or repeat the solution ([results.md](results.md)).\n\n" + network.Reference())
}
