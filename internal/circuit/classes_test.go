package circuit

import (
	"go/ast"
	"go/parser"
	"go/token"
	"slices"
	"testing"
)

// Every part kind of the package is listed and bears one of the letters in use.
func TestEveryKindHasAClass(t *testing.T) {
	file, err := parser.ParseFile(token.NewFileSet(), "circuit.go", nil, 0)
	if err != nil {
		t.Fatal(err)
	}
	n := 0
	ast.Inspect(file, func(x ast.Node) bool {
		if s, ok := x.(*ast.ValueSpec); ok {
			if id, ok := s.Type.(*ast.Ident); ok && id.Name == "Kind" {
				n += len(s.Names)
			}
		}
		return true
	})
	if n != len(Kinds) || n == 0 {
		t.Errorf("%d kinds are declared, %d listed", n, len(Kinds))
	}
	for _, k := range Kinds {
		if !slices.ContainsFunc(Classes, func(c Class) bool { return c.Letter == k.Letter() }) {
			t.Errorf("%s bears %s, which no class explains", k, k.Letter())
		}
	}
	for _, c := range Classes {
		if len(KindsOf(c.Letter)) == 0 && c.Letter != "W" {
			t.Errorf("no kind bears %s", c.Letter)
		}
	}
}

// The letters of some kinds as the 2009 edition's main classes have them (from memory):
// a fuse protects, a luminaire gives light, a resistor limits, a relay processes.
func TestLettersOfThe2009Edition(t *testing.T) {
	for k, want := range map[Kind]string{
		Fuse: "F", Battery: "G", Transformer: "T", Bridge: "T", Resistor: "R", Diode: "R", Capacitor: "C", SignalLamp: "P",
		SwitchIsolator: "Q", Relay: "K", LDR: "B", PushButton: "S", Terminal: "X", LuminaireLamp: "E",
	} {
		if got := k.Letter(); got != want {
			t.Errorf("%s bears %s, want %s", k, got, want)
		}
	}
}
