package packet

import (
	"bytes"
	"testing"
)

// Every lighting circuit has its picture, each fuse on its way is named, and the same
// design gives the same bytes.
func TestTimeCurrentShowsEveryPath(t *testing.T) {
	d := example(t, "bracken-reach")
	data, err := TimeCurrent(d)
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range d.Site.Circuits {
		if !bytes.Contains(data, []byte("From the battery to "+c.Name.Val)) {
			t.Errorf("no picture of %s", c.Name.Val)
		}
	}
	for _, f := range d.Fuses {
		if f.Way != nil && f.Way.Lighting != nil && !bytes.Contains(data, []byte(f.Part.Designation)) {
			t.Errorf("%s stands nowhere", f.Part.Designation)
		}
	}
	again, err := TimeCurrent(d)
	if err != nil || !bytes.Equal(data, again) {
		t.Error("drawn twice, the bytes differ", err)
	}
}
