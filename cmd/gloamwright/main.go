// Command gloamwright sizes, proves and documents extra-low-voltage DC standby
// lighting from one description.
package main

import "os"

func main() { os.Exit(run(os.Args[1:], os.Stdin, os.Stdout, os.Stderr)) }
