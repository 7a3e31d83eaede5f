package design_test
import ("testing";"fmt";"gloamwright/internal/design")
func TestZZ(t *testing.T){
 for _,n:=range []string{"juniper-flat","bracken-reach"}{
 d,_:=design.Make(load(t,n),nil)
 for _,w:=range d.Workings { fmt.Printf("%s | %s | %s | %s | %.6g %s | %v\n",w.For,w.Name,w.Formula,w.Substituted,w.Value,w.Unit,w.Uses)}
 for _,c:=range d.Conditions{fmt.Println(c.Key,c.BatteryV,c.BatteryA,c.State,c.Lit,c.Values)}
 for _,c:=range d.Findings{fmt.Println(c.Severity,c.Check,c.Message)}
 }
}
