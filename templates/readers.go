package templates

func readCautions(r *reader, t *Texts, top node) {
	r.fields(top, []string{"cautions", "competence", "remark"}, func(key string, v node) {
		switch key {
		case "cautions":
			r.items(v, func(n node) {
				c := Caution{}
				r.fields(n, []string{"signal", "when", "head", "at", "text", "absent"}, func(k string, v node) {
					switch k {
					case "signal":
						c.Signal = r.oneOf(v, Signals)
					case "when":
						c.When = r.when(v)
					case "head":
						c.Head = r.text(v, "")
					case "at":
						c.At = r.text(v, "")
					case "text":
						c.Text = r.text(v, "")
					case "absent":
						c.Absent = r.word(v)
					}
				})
				if c.Signal == "" || c.Head == "" || c.Text == "" {
					r.report(n.at(), "incomplete caution", "A caution has a signal, a head and a text.")
				}
				t.Cautions = append(t.Cautions, c)
			})
		case "competence":
			r.items(v, func(n node) {
				c := Competence{}
				r.fields(n, []string{"work", "who", "when"}, func(k string, v node) {
					switch k {
					case "work":
						c.Work = r.text(v, "")
					case "who":
						c.Who = r.text(v, "")
					case "when":
						c.When = r.when(v)
					}
				})
				t.Competence = append(t.Competence, c)
			})
		case "remark":
			t.Remark = r.text(v, "")
		}
	})
}

func readChecklist(r *reader, t *Texts, top node) {
	r.fields(top, []string{"blocks"}, func(_ string, v node) {
		r.items(v, func(n node) {
			b := Block{}
			r.fields(n, []string{"letter", "title", "sheet", "purpose", "before", "remark", "lines", "hold"}, func(k string, v node) {
				switch k {
				case "letter":
					b.Letter = r.word(v)
				case "title":
					b.Title = r.text(v, "")
				case "sheet":
					b.Sheet = r.text(v, "")
				case "purpose":
					b.Purpose = r.text(v, "")
				case "before":
					b.Before = r.text(v, "")
				case "remark":
					b.Remark = r.text(v, "")
				case "lines":
					r.items(v, func(n node) { b.Lines = append(b.Lines, readLine(r, n)) })
				case "hold":
					b.Hold = &Hold{}
					r.fields(v, []string{"text", "who"}, func(k string, v node) {
						if k == "text" {
							b.Hold.Text = r.text(v, "", "first", "last")
						} else {
							b.Hold.Who = r.text(v, "")
						}
					})
				}
			})
			if b.Letter == "" || b.Title == "" || len(b.Lines) == 0 {
				r.report(n.at(), "incomplete block", "A block has a letter, a title and lines.")
			}
			t.Checklist = append(t.Checklist, b)
		})
	})
}

func readLine(r *reader, n node) Line {
	l := Line{}
	given := map[string]node{}
	r.fields(n, lineKeys, func(k string, v node) { given[k] = v })
	// what a line is repeated for decides which values its texts may use
	if v, ok := given["each"]; ok {
		var list []string
		for _, x := range Repeats {
			list = append(list, x.Name)
		}
		l.Each = r.oneOf(v, list)
	}
	text := func(key string) string {
		if v, ok := given[key]; ok {
			return r.text(v, l.Each)
		}
		return ""
	}
	if v, ok := given["key"]; ok {
		l.Key = r.word(v)
	}
	if v, ok := given["when"]; ok {
		l.When = r.when(v)
	}
	l.Do, l.Expect, l.Unit, l.Write, l.Otherwise = text("do"), text("expect"), text("unit"), text("write"), text("otherwise")
	if l.Do == "" {
		r.report(n.at(), "a line without \"do\"", "A line says what to do.")
	}
	if len(l.When) > 0 && l.Otherwise == "" {
		r.report(n.at(), "a line without \"otherwise\"", "A line that may not apply says why not: it is printed with the reason.")
	}
	return l
}

var lineKeys = []string{"key", "each", "do", "expect", "unit", "write", "when", "otherwise"}

func readFaults(r *reader, t *Texts, top node) {
	r.fields(top, []string{"remedies"}, func(_ string, v node) {
		r.items(v, func(n node) {
			m := Remedy{}
			r.fields(n, []string{"fault", "do"}, func(k string, v node) {
				if k == "fault" {
					m.Fault = r.word(v)
				} else {
					m.Do = r.text(v, "", "part")
				}
			})
			t.Remedies = append(t.Remedies, m)
		})
	})
}

func readLegend(r *reader, t *Texts, top node) {
	r.fields(top, []string{"groups"}, func(_ string, v node) {
		r.items(v, func(n node) {
			g := LegendGroup{}
			r.fields(n, []string{"title", "remark", "rows"}, func(k string, v node) {
				switch k {
				case "title":
					g.Title = r.text(v, "")
				case "remark":
					g.Remark = r.text(v, "")
				case "rows":
					r.items(v, func(n node) {
						x := LegendRow{}
						r.fields(n, []string{"sign", "means"}, func(k string, v node) {
							if k == "sign" {
								x.Sign = r.text(v, "")
							} else {
								x.Means = r.text(v, "")
							}
						})
						g.Rows = append(g.Rows, x)
					})
				}
			})
			t.Legend = append(t.Legend, g)
		})
	})
}
