package describe

import (
	"os"
	"strings"
	"testing"
)

// sample reads the description that is right in everything.
func sample(t testing.TB) string {
	t.Helper()
	src, err := os.ReadFile("testdata/sample.yaml")
	if err != nil {
		t.Fatal(err)
	}
	return string(src)
}

// marked returns the text that a span stands for.
func marked(t testing.TB, src string, s Span) string {
	t.Helper()
	lines := splitLines([]byte(src))
	if s.Line < 1 || s.Line > len(lines) {
		t.Fatalf("line %d is not in the file", s.Line)
	}
	line := []rune(lines[s.Line-1])
	if s.Col < 1 || s.Col-1+s.Len > len(line) {
		t.Fatalf("span %+v is not in line %q", s, string(line))
	}
	return string(line[s.Col-1 : s.Col-1+s.Len])
}

// mistake is one change to the sample and the one diagnostic that it must give.
type mistake struct {
	why      string
	old, new string // the change
	mark     string // the text under the mark
	want     string // "code summary: detail"
	related  string // "text under the related mark | message", empty for none
}

var mistakes = []mistake{
	// Units.
	{"a bare number", "nominal: 24 V", "nominal: 24", "24",
		`D020 missing unit: "24" needs a unit: write "24 V".`, ""},
	{"several units could be meant", "outage: 4 h", "outage: 4", "4",
		`D020 missing unit: "4" needs a unit: write "4 h", "4 min" or "4 s".`, ""},
	{"a bare number in a field of a stage", "along: 28 m", "along: 28", "28",
		`D020 missing unit: "28" needs a unit: write "28 m" or "28 ft".`, ""},
	{"a unit that no tape has", "  paper: iso", "  lengths: feet", "feet",
		`D025 not a choice: "feet" is not a choice here. Choices: m, ft.`, ""},
	{"a percentage without its sign", "lamp_drop: 5 %", "lamp_drop: 5", "5",
		`D020 missing unit: "5" needs a unit: write "5 %".`, ""},
	{"a bare number as cable", "cable: 1.5 mm²", "cable: 16", "16",
		`D020 missing unit: "16" needs a unit: write "16 mm²" or "16 AWG".`, ""},
	{"a point whose length has no unit", "9 m corridor at west door", "9 corridor at west door", "9 corridor at west door",
		`D020 missing unit: The length "9" needs a unit: write "9 m corridor at west door" or "9 ft corridor at west door".`, ""},
	{"the unit of another quantity", "fuse: 2 A", "fuse: 2 V", "2 V",
		`D021 wrong unit: "2 V" is a voltage; a current belongs here, such as 2 A or 300 mA.`, ""},
	{"square millimetres written as millimetres", "cable: 1.5 mm²", "cable: 1.5 mm", "1.5 mm",
		`D021 wrong unit: "1.5 mm" is a length; a conductor size belongs here, such as 1.5 mm² or 16 AWG.`, ""},
	{"a duration in a length", "4 m corridor at bunk 2", "4 h corridor at bunk 2", "4 h corridor at bunk 2",
		`D021 wrong unit: "4 h corridor at bunk 2" is a duration; a length belongs here, such as 9 m or 30 ft.`, ""},
	{"an unknown unit", "power: 6 W", "power: 6 hp", "6 hp",
		`D022 unknown unit: "hp" is no unit of power: write "6 W".`, ""},
	{"capitals of a unit", "current: 20 mA", "current: 20 MA", "20 MA",
		`D022 unknown unit: "MA" is no unit of current: write "20 mA".`, ""},
	{"a comma for the decimal point, in quotes", "cable: 1.5 mm²", `cable: "1,5 mm²"`, `"1,5 mm²"`,
		`D023 comma in a number: "1,5 mm²" has a comma in a number; use a decimal point and no separator for thousands: write "1.5 mm²".`, ""},
	{"no number at all", "outage: 4 h", "outage: long", "long",
		`D023 bad value: "long" is not a duration: write a number and a unit, such as 4 h or 30 min.`, ""},
	{"a range upside down", "works: 18 V..32 V", "works: 32 V..18 V", "32 V..18 V",
		`D023 bad value: "32 V..18 V" runs downwards: write "18 V..32 V".`, ""},
	{"one value for a range", "battery_room: 5 °C..30 °C", "battery_room: 5 °C", "5 °C",
		`D023 bad value: "5 °C" is a single value; a range belongs here, such as 5 °C..30 °C.`, ""},
	{"mains without a tolerance", "rated: 24 V 0.5 A, mains: 230 V ± 10 %", "rated: 24 V 0.5 A, mains: 230 V", "230 V",
		`D023 bad value: "230 V" says no tolerance: write "230 V ± 10 %", with the supply's own figure.`, ""},
	{"a rating without its current", "rated: 24 V 0.5 A", "rated: 24 V", "24 V",
		`D023 bad value: "24 V" says no current: write both, such as 24 V 0.5 A.`, ""},

	// Values.
	{"above a bound of the language", "lamp_drop: 5 %", "lamp_drop: 50 %", "50 %",
		`D024 out of range: "50 %" is out of range: from 0.5 % to 20 %.`, ""},
	{"above a bound of a kind", "power: 6 W", "power: 600 W", "600 W",
		`D024 out of range: "600 W" is out of range: from 0.1 W to 200 W.`, ""},
	{"one end of a range outside", "battery_room: 5 °C..30 °C", "battery_room: 5 °C..70 °C", "5 °C..70 °C",
		`D024 out of range: "5 °C..70 °C" is out of range: from -40 °C to 60 °C.`, ""},
	{"the current of a rating outside", "rated: 24 V 0.5 A", "rated: 24 V 500 A", "24 V 500 A",
		`D024 out of range: "24 V 500 A" is out of range: from 1 V 1 mA to 60 V 100 A.`, ""},
	{"mains outside", "rated: 24 V 0.5 A, mains: 230 V ± 10 %", "rated: 24 V 0.5 A, mains: 23 V ± 10 %", "23 V ± 10 %",
		`D024 out of range: "23 V ± 10 %" is out of range: from 90 V to 264 V.`, ""},
	{"a leg of no length", "3 m porch", "0 m porch", "0 m",
		`D024 out of range: "0 m" is out of range: from 0.05 m to 2 km.`, ""},
	{"a nominal voltage that nothing is made for", "nominal: 24 V", "nominal: 30 V", "30 V",
		`D024 not a nominal voltage: 30 V is not a nominal voltage here: write 12 V, 24 V, 36 V or 48 V.`, ""},
	{"above extra-low voltage", "nominal: 24 V", "nominal: 110 V", "110 V",
		`D026 above extra-low voltage: 110 V is above extra-low voltage: at most 60 V DC (IEC 61140). This program does not design anything above it.`, ""},
	{"a supply above extra-low voltage", "rated: 24 V 0.5 A", "rated: 72 V 0.5 A", "72 V 0.5 A",
		`D026 above extra-low voltage: 72 V is above extra-low voltage: at most 60 V DC (IEC 61140). This program does not design anything above it.`, ""},
	{"a lamp that needs more than extra-low voltage", "works: 18 V..32 V", "works: 100 V..240 V", "100 V..240 V",
		`D026 above extra-low voltage: 100 V is above extra-low voltage: at most 60 V DC (IEC 61140). This program does not design anything above it.`, ""},
	{"a word that is not a choice", "lit: outage-night, fuse", "lit: outage-nihgt, fuse", "outage-nihgt",
		`D025 not a choice: "outage-nihgt" is not a choice here. Did you mean outage-night? Choices: outage-night, outage, night, always.`, ""},
	{"a word that is near none", "cells: vrla-agm", "cells: potato", "potato",
		`D025 not a choice: "potato" is not a choice here. Choices: vrla-agm, flooded, lifepo4.`, ""},
	{"neither yes nor no", "cells: vrla-agm", "cells: vrla-agm, isolator: maybe", "maybe",
		`D025 not a choice: "maybe" is neither yes nor no.`, ""},
	{"a count with a unit", "series: 6", "series: 6 pcs", "6 pcs",
		`D027 bad number: "6 pcs" is not a whole number: write digits alone, such as 8.`, ""},
	{"a count with a fraction", "ways: 8", "ways: 8.5", "8.5",
		`D027 bad number: "8.5" is not a whole number: write digits alone, such as 8.`, ""},
	{"a price that is no number", "  paper: iso", "  prices: {photocell: cheap}", "cheap",
		`D027 bad price: "cheap" is not a price: write a number in your currency, with a decimal point and without its sign, such as 0.85. 0 is for what another price holds.`, ""},
	{"a price with the sign of a currency", "  paper: iso", "  prices: {1.5 mm²: €0.60}", "€0.60",
		`D027 bad price: "€0.60" is not a price: write a number in your currency, with a decimal point and without its sign, such as 0.85. 0 is for what another price holds.`, ""},
	{"a price of a misspelt thing", "  paper: iso", "  prices: {chargr 24 V 3 A: 60}", "chargr 24 V 3 A",
		`D052 unknown part: "chargr 24 V 3 A" is nothing that can have a price. Did you mean charger?`, ""},
	{"a price that does not say of what", "  paper: iso", "  prices: {fuse: 1}", "fuse",
		`D052 name too short: Behind fuse stands a class and a rating: write fuse blade 2 A.`, ""},
	{"a price of a misspelt class of fuses", "  paper: iso", "  prices: {fuse blad 2 A: 1}", "fuse blad 2 A",
		`D052 unknown fuse class: "blad" is no class of fuses. Did you mean blade?`, ""},
	{"a price of a fuse without its rating", "  paper: iso", "  prices: {fuse-link knife: 9}", "fuse-link knife",
		`D052 name too short: A price is for one rating: write fuse-link knife 16 A.`, ""},
	{"a price of a rating that is not made", "  paper: iso", "  prices: {fuse blade 6 A: 1}", "fuse blade 6 A",
		`D052 no such fuse: Fuses of class blade have no rating of 6 A. Ratings: 1 A, 2 A, 3 A, 4 A, 5 A, 7.5 A, 10 A, 15 A, 20 A, 25 A, 30 A, 35 A, 40 A.`, ""},
	{"a price of a holder with a rating", "  paper: iso", "  prices: {fuse-holder blade 2 A: 1}", "fuse-holder blade 2 A",
		`D052 name too long: A fuse-holder takes every rating of its class: write fuse-holder blade.`, ""},
	{"a price of misspelt cells", "  paper: iso", "  prices: {block vrla-amg 12 V 55 Ah: 1}", "block vrla-amg 12 V 55 Ah",
		`D052 unknown cells: "vrla-amg" are no cells. Did you mean vrla-agm?`, ""},
	{"a price of a block that is not made", "  paper: iso", "  prices: {block nimh 12 V 8 Ah: 1}", "block nimh 12 V 8 Ah",
		`D052 no such block: There is no nimh block of 12 V 8 Ah. Blocks: 12 V 1.6 Ah, 12 V 2 Ah, 12 V 4 Ah, 12 V 7 Ah, 12 V 10 Ah.`, ""},
	{"a price of a block without its capacity", "  paper: iso", "  prices: {block nimh 12 V: 1}", "block nimh 12 V",
		`D052 name too short: A price is for one block: write block nimh 12 V 1.6 Ah.`, ""},
	{"a price of a charger without its voltage", "  paper: iso", "  prices: {charger 3 A: 60}", "charger 3 A",
		`D021 wrong unit: "3 A" is a current; a voltage and a current belongs here, such as 24 V 0.5 A.`, ""},
	{"a price of a supply above extra-low voltage", "  paper: iso", "  prices: {regulated-supply 110 V 1 A: 60}", "regulated-supply 110 V 1 A",
		`D026 above extra-low voltage: 110 V is above extra-low voltage: at most 60 V DC (IEC 61140). This program does not design anything above it.`, ""},
	{"a price of a size without its unit", "  paper: iso", "  prices: {1.5: 0.6}", "1.5",
		`D020 missing unit: "1.5" needs a unit: write "1.5 mm²".`, ""},
	{"a price of a plain part with its value", "  paper: iso", "  prices: {resistor 10 kΩ: 0.1}", "resistor 10 kΩ",
		`D052 name too long: A resistor has one price, whatever its value: write resistor alone.`, ""},
	{"a price of a board by its name", "  paper: iso", "  prices: {distribution-board annex: 30}", "distribution-board annex",
		`D027 bad number: "annex" is not a whole number: write digits alone, such as 8.`, ""},
	{"a price given twice in two spellings", "  paper: iso", "  prices: {1.5 mm²: 0.6, 1.5 mm2: 0.7}", "1.5 mm2",
		`D012 price given twice: 1.5 mm² has a price already. Remove one of them.`, "1.5 mm² | first given here"},
	{"a currency that fills a column", "  paper: iso", "  currency: pounds and pence", "pounds and pence",
		`D029 text too long: "pounds and pence" has 16 characters; at most 12 fit.`, ""},
	{"a date in another order", "date: 2026-12-01", "date: 1.12.2026", "1.12.2026",
		`D029 bad date: "1.12.2026" is not a date: write year-month-day, such as 2026-12-01.`, ""},
	{"a date that is not in the calendar", "date: 2026-12-01", "date: 2026-02-30", "2026-02-30",
		`D029 bad date: "2026-02-30" is not in the calendar: write year-month-day, such as 2026-12-01.`, ""},
	{"a revision that reads as a digit", "revision: A", "revision: O", "O",
		`D029 bad revision: "O" has the letter O, which is taken for a digit. A revision is a capital letter, A to Z without I and O, or two of them.`, ""},
	{"a revision in small letters", "revision: A", "revision: a", "a",
		`D029 bad revision: "a" is not in capitals. A revision is a capital letter, A to Z without I and O, or two of them.`, ""},
	{"a capacity table out of order", "cells: vrla-agm", "cells: vrla-agm, table: [20 h 55 Ah, 5 h 60 Ah]", "5 h 60 Ah",
		`D024 capacity table out of order: 60 Ah in 5 h cannot stand beside 55 Ah in 20 h: a longer discharge gives more capacity.`, ""},
	{"a point of a capacity table without a time", "cells: vrla-agm", "cells: vrla-agm, table: [55 Ah]", "55 Ah",
		`D023 bad value: "55 Ah" does not start with a time: write the discharge time and the capacity at it, such as 20 h 55 Ah.`, ""},

	// Names that could lead out of the output folder.
	{"a slash", "number: BR-2041", "number: ../../etc", "../../etc",
		`D028 bad name: "../../etc" has "/" in it. Letters, digits, space, - _ . may stand in it.`, ""},
	{"a backslash", "number: BR-2041", `number: BR\2041`, `BR\2041`,
		`D028 bad name: "BR\\2041" has "\" in it. Letters, digits, space, - _ . may stand in it.`, ""},
	{"two points", "number: BR-2041", "number: BR..2041", "BR..2041",
		`D028 bad name: "BR..2041" has two points or two spaces together. Letters, digits, space, - _ . may stand in it.`, ""},
	{"a hidden folder", "number: BR-2041", "number: .ssh", ".ssh",
		`D028 bad name: ".ssh" does not start with a letter or a digit. Letters, digits, space, - _ . may stand in it.`, ""},
	{"a control character, escaped", "number: BR-2041", `number: "BR\0"`, `"BR\0"`,
		`D028 bad name: "BR\x00" has the character U+0000 in it. Letters, digits, space, - _ . may stand in it.`, ""},
	{"the name of a device", "number: BR-2041", "number: nul.1", "nul.1",
		`D028 bad name: "nul.1" cannot name a folder on every system. Choose another.`, ""},
	{"too long", "number: BR-2041", "number: " + strings.Repeat("x", 61), strings.Repeat("x", 61),
		`D028 bad name: "` + strings.Repeat("x", 59) + `…" is too long: 61 characters, at most 60.`, ""},
	{"a revision with a path in it", "revision: A", "revision: ../A", "../A",
		`D029 bad revision: "../A" is no revision. A revision is a capital letter, A to Z without I and O, or two of them.`, ""},
	{"a slash in the name of a circuit", "name: Stair,", "name: Stair/up,", "Stair/up",
		`D028 bad name: "Stair/up" has "/" in it. Letters, digits, space, - _ . & ( ) , + ' ’ may stand in it.`, ""},
	{"a point in the name of a stage", "dusk:     {", "du.sk:     {", "du.sk",
		`D028 bad name: "du.sk" has "." in it. Such a name is one word: a letter first, then letters, digits, - and _.`, ""},
	{"text that turns the writing direction, escaped", "client: Bracken Reach Trust", `client: "a\u202Eb"`, `"a\u202Eb"`,
		`D029 bad text: "a b" has a line end or the character U+202E in it. Write it on one line.`, ""},

	// Keys.
	{"a misspelt key of a section", "recharge: 24 h", "rechrage: 24 h", "rechrage",
		`D011 unknown key: duty has no key "rechrage". Did you mean recharge?`, ""},
	{"a misspelt key at the top", "practice:  ", "practise:  ", "practise",
		`D011 unknown key: A description has no key "practise". Did you mean practice?`, ""},
	{"a misspelt key of a kind", "flux: 600 lm", "fluxx: 600 lm", "fluxx",
		`D011 unknown key: The luminaire corridor (led-driver) has no key "fluxx". Did you mean flux?`, ""},
	{"a key that is near none", "client: Bracken Reach Trust", "telephone: 1", "telephone",
		`D011 unknown key: job has no key "telephone". Keys here: number, title, client, site, prepared, revision, date.`, ""},
	{"a misspelt key of a circuit", "cable: 1.5 mm²", "cabel: 1.5 mm²", "cabel",
		`D011 unknown key: The circuit Stair has no key "cabel". Did you mean cable?`, ""},
	{"a misspelt key of a point", "9 m corridor at west door", "{leg: 9 m, luminare: corridor, luminaire: corridor}", "luminare",
		`D011 unknown key: A point has no key "luminare". Did you mean luminaire?`, ""},
	{"a key given twice", "outage: 4 h", "outage: 4 h\n  outage: 5 h", "outage",
		`D012 key given twice: outage stands twice in duty. Remove one of them.`, "outage | first given here"},
	{"two stages of one name", "guard:    {", "store:    {kind: battery, cells: flooded}\n  guard:    {", "store",
		`D012 key given twice: store stands twice in stages. Remove one of them.`, "store | first given here"},
	{"a required key left out", "  outage: 4 h\n", "", "duty",
		`D013 missing key: duty needs the key outage. Such as outage: 3 h`, ""},
	{"a required key of a kind left out", "power: 6 W, ", "", "corridor",
		`D013 missing key: The luminaire corridor (led-driver) needs the key power. Power. Such as power: 6 W`, ""},
	{"no kind", "kind: battery, cells: vrla-agm", "cells: vrla-agm", "store",
		`D013 missing key: The stage store needs the key kind. Kinds: regulated-supply, charger, battery, low-voltage-disconnect, changeover-relay, photocell, distribution-board.`, ""},
	{"a key without a value", "outage: 4 h", "outage:", "outage",
		`D014 missing value: Write a value after outage:, or remove the key.`, ""},
	{"a list where a mapping belongs", "colours: {positive: RD, negative: BK}", "colours: [RD, BK]", "[RD, BK]",
		`D010 wrong form: colours is a mapping (key: value), not a list.`, ""},
	{"a mapping where a value belongs", "outage: 4 h", "outage: {hours: 4}", "{hours: 4}",
		`D010 wrong form: outage is a single value, not a mapping (key: value).`, ""},
	{"a value where a list belongs", "points: [11 m corridor, 3 m corridor]", "points: 11 m corridor", "11 m corridor",
		`D010 wrong form: points is a list, not a single value. Write it in brackets [ ], or one entry a line after "- ".`, ""},
	{"a merge key", "outage: 4 h", "outage: 4 h\n  <<: {recharge: 3 h}", "<<",
		`D015 merge key: The merge key << is not read here. Write the keys out.`, ""},
	{"another version", "gloamwright: 1", "gloamwright: 2", "2",
		`D007 unknown version: This program reads version 1 of the description language: write gloamwright: 1.`, ""},

	// Colours.
	{"a colour in words", "positive: RD", "positive: red", "red",
		`D051 unknown colour: "red" is no colour code of IEC 60757. Did you mean RD (red)? Codes: BK, BN, RD, OG, YE, GN, BU, VT, GY, WH, PK, GD, TQ, SR.`, ""},
	{"the protective colour", "positive: RD", "positive: GNYE", "GNYE",
		`D051 protective colour: Green-and-yellow is kept for protective conductors (IEC 60445). Choose another colour.`, ""},
	{"one colour for both poles", "positive: RD, negative: BK", "positive: BK, negative: BK", "colours",
		`D051 one colour for both poles: Both poles would be BK. Give plus and minus different colours.`, ""},
	{"gauges among metric sizes", "  paper: iso", "  sizes: [1.5 mm², 16 AWG]", "[1.5 mm², 16 AWG]",
		`D029 size of the other system: 16 AWG is not a size of conductors: metric. Write all sizes in one system.`, ""},

	// Names that nothing bears.
	{"a misspelt stage", "from: guard, holds", "from: gaurd, holds", "gaurd",
		`D030 unknown stage: No stage is called "gaurd". Did you mean guard?`, ""},
	{"a misspelt board", "name: Boathouse, board: annex", "name: Boathouse, board: anex", "anex",
		`D030 unknown board: No board is called "anex". Did you mean annex?`, ""},
	{"a misspelt luminaire", "11 m corridor", "11 m coridor", "coridor",
		`D030 unknown luminaire: No luminaire is called "coridor". Did you mean corridor?`, ""},
	{"a misspelt luminaire in a branch", "3 m porch", "3 m proch", "proch",
		`D030 unknown luminaire: No luminaire is called "proch". Did you mean porch?`, ""},
	{"a misspelt stage kind", "kind: changeover-relay", "kind: change-over-relay", "change-over-relay",
		`D032 unknown kind: There is no stage kind "change-over-relay". Did you mean changeover-relay?`, ""},
	{"a misspelt luminaire kind", "kind: led-string", "kind: ledstring", "ledstring",
		`D032 unknown kind: There is no luminaire kind "ledstring". Did you mean led-string?`, ""},
	{"a misspelt port", "from: transfer.break", "from: transfer.brake", "transfer.brake",
		`D033 unknown port: transfer (changeover-relay) has no port "brake". It gives at: transfer.break, transfer.make.`, ""},
	{"a port with one slip", "from: transfer.break", "from: transfer.breaks", "transfer.breaks",
		`D033 unknown port: transfer (changeover-relay) has no port "breaks". Did you mean transfer.break?`, ""},
	{"a port that takes and does not give", "from: transfer.break", "from: transfer.coil", "transfer.coil",
		`D033 unsuitable port: transfer.coil gives nothing. It gives at: transfer.break, transfer.make.`, ""},
	{"a stage with several ports", "from: transfer.break", "from: transfer", "transfer",
		`D033 port left open: transfer has several ports here. Say which: transfer.break or transfer.make.`, ""},
	{"a stage that gives nothing", "from: transfer.break", "from: charger", "charger",
		`D033 no suitable port: charger is a charger and gives nothing.`, ""},
	{"a reference that is no name", "from: transfer.break", "from: the relay", "the relay",
		`D028 bad name: "the relay" does not name a stage: write the stage, or stage.port.`, ""},
	{"a circuit on a stage that is no board", "name: Stair, board: board", "name: Stair, board: guard", "guard",
		`D037 circuit on a stage that is no board: guard is a low-voltage-disconnect and has no ways. Boards: board, annex.`, ""},
	{"a test point on no stage", "test_points: []", "test_points: [{name: Far end, at: stor.plus}]", "stor.plus",
		`D030 unknown stage: No stage is called "stor". Did you mean store?`, ""},
	{"a test point on no port", "test_points: []", "test_points: [{name: Far end, at: store.plush}]", "store.plush",
		`D033 unknown port: store (battery) has no port "plush". Did you mean plus?`, ""},
	{"a part on a pin that it has not", "parts: []", "parts: [{name: bleed, kind: resistor, value: 1 kΩ, pins: {1: store.plus, 3: store.minus, 2: store.minus}}]", "3",
		`D033 unknown pin: A resistor has no pin "3". Pins: 1, 2.`, ""},
	{"a part with a pin on no net", "parts: []", "parts: [{name: bleed, kind: resistor, value: 1 kΩ, pins: {1: store.plus}}]", "pins",
		`D013 missing pin: Pin 2 of the resistor is on no net.`, ""},

	// Names used twice.
	{"two circuits of one name", "name: Stair,", "name: Boathouse,", "Boathouse",
		`D031 name used twice: Two circuits are called Boathouse. Give each its own name; labels follow it.`, "Boathouse | first used here"},
	{"two test points of one name", "test_points: []", "test_points: [{name: A, at: store.plus}, {name: A, at: store.minus}]", "A",
		`D031 name used twice: Two test points are called A. Give each its own name.`, "A | first used here"},

	// Connections.
	{"two chargers on one battery", "guard:    {", "spare:    {kind: charger, to: store, mains: 230 V ± 10 %}\n  guard:    {", "store",
		`D034 two sources feed one thing: store.charge is fed from charger already; spare cannot feed it too. It takes one source.`, "store | fed from charger here"},
	{"a third source on a coil", "guard:    {", "dawn:     {kind: photocell, from: store, holds: transfer}\n  guard:    {", "transfer",
		`D034 two sources feed one thing: transfer.coil is fed from dawn and presence already; dusk cannot feed it too. It takes at most 2 sources.`, "transfer | fed from dawn here"},
	{"a loop of boards", "from: transfer.break, ways: 8", "from: annex, ways: 8", "annex",
		`D035 loop of boards: board is fed from annex, annex is fed from board: no source feeds the loop. Feed one of them from outside it.`, "board | and annex is fed from board here"},
	{"a loop of stages", "guard:    {", "north: {kind: low-voltage-disconnect, from: south}\n  south: {kind: low-voltage-disconnect, from: north}\n  guard:    {", "south",
		`D035 loop of stages: north is fed from south, south is fed from north: no source feeds the loop. Feed one of them from outside it.`, "north | and south is fed from north here"},
	{"a board that names itself", "from: transfer.break, ways: 8", "from: board, ways: 8", "board",
		`D035 stage feeds itself: board names itself under from. Name another stage.`, ""},
	{"a battery that feeds nothing", "guard:    {", "spare:    {kind: battery, cells: flooded}\n  guard:    {", "spare",
		`D036 battery that feeds nothing: No stage takes from spare. Let one: give it from: spare, or remove spare.`, ""},

	// Circuits.
	{"a circuit without points", "points: [11 m corridor, 3 m corridor]", "points: []", "points",
		`D041 circuit without points: The circuit Stair lights nothing. List its luminaires from the board on, such as [9 m lamp, 4 m lamp].`, ""},
	{"a branch without points", "{branch: [3 m porch]}", "{branch: []}", "branch",
		`D041 branch without points: The branch lights nothing. List its luminaires, or remove it.`, ""},
	{"a branch before any point", "[11 m corridor, 3 m corridor]", "[{branch: [3 m corridor]}, 11 m corridor]", "branch",
		`D045 branch without a point before it: A branch hangs on the point before it in the list. Put that point first.`, ""},
	{"a point without a luminaire", "11 m corridor", "11 m", "11 m",
		`D046 point without a luminaire: "11 m" does not say which luminaire hangs at the end: write 11 m lamp, or 11 m lamp at its place.`, ""},
	{"a point with a place but no \"at\"", "11 m corridor", "11 m corridor top landing", "corridor top landing",
		`D046 bad point: "corridor top landing" is more than a luminaire; a place comes after "at": write 11 m corridor at top landing.`, ""},
	{"a point without a length", "11 m corridor", "corridor at the top", "corridor at the top",
		`D046 bad point: "corridor at the top" is not a point: write length, luminaire and perhaps place, such as 9 m corridor at west door.`, ""},
	{"an \"at\" without a place", "11 m corridor", `"11 m corridor at "`, `"11 m corridor at "`,
		`D046 point without its place: "11 m corridor at " ends with "at": name the place after it, or leave it out.`, ""},
	{"one way for two circuits", "  - {name: Stair, board: board,", "  - {name: Attic, board: board, way: 1, points: [3 m porch]}\n  - {name: Stair, board: board, way: 1,", "1",
		`D042 way pinned twice: Way 1 of board holds Attic already. Give Stair another way.`, "1 | first pinned here"},
	{"one way for a circuit and a board", "along: 28 m, ways: 4}", "along: 28 m, ways: 4, way: 3}\n  far: {kind: distribution-board, from: board, way: 3}", "3",
		`D042 way pinned twice: Way 3 of board holds annex already. Give far another way.`, "3 | first pinned here"},
	{"a way that the board does not have", "name: Boathouse, board: annex,", "name: Boathouse, board: annex, way: 5,", "5",
		`D042 no such way: annex has 4 ways; there is no way 5.`, ""},
	{"more circuits than ways", "from: transfer.break, ways: 8", "from: transfer.break, ways: 2", "board",
		`D043 more circuits than ways: board has 2 ways, and 2 circuits and 1 board hang on it. Give it ways: 3 or more, or move some to another board.`, "2 | the ways are given here"},
	{"a former name that is still in use", "name: Stair, board", "name: Stair, was: Boathouse, board", "Boathouse",
		`D044 former name still in use: A circuit is still called Boathouse and keeps its labels. Remove was:, or give that circuit its own was:.`, "Boathouse | in use here"},
	{"a former name claimed twice", "  - {name: Stair, board: board,", "  - {name: Attic, board: board, was: Loft, points: [3 m porch]}\n  - {name: Stair, board: board, was: Loft,", "Loft",
		`D044 former name claimed twice: Two circuits say they were Loft; its labels can follow only one.`, "Loft | first claimed here"},
	{"a former name that is the present one", "name: Stair, board", "name: Stair, was: Stair, board", "Stair",
		`D044 former name is the present one: Stair was not renamed. Remove was:.`, ""},

	// Files.
	{"a shared file that leads out", "practice:                      # the firm's limits\n  conductors: metric\n  paper: iso\n  lamp_drop: 5 %\n  clear_within: 5 s\n  colours: {positive: RD, negative: BK}\n", "practice: ../house.yaml\n", "../house.yaml",
		`D050 bad file name: "../house.yaml" leads out of the description's folder. A file is named from the description's folder, inside it, with /, such as house.yaml or firm/house.yaml.`, ""},
	{"texts on another drive", "  paper: iso", `  texts: C:\texts`, `C:\texts`,
		`D050 bad file name: "C:\\texts" has \ or : in it. A file is named from the description's folder, inside it, with /, such as house.yaml or firm/house.yaml.`, ""},
}

// TestMistakes makes one mistake at a time and asks for exactly one diagnostic, at
// the right place, in the right words.
func TestMistakes(t *testing.T) {
	right := sample(t)
	for _, m := range mistakes {
		t.Run(m.why, func(t *testing.T) {
			if !strings.Contains(right, m.old) {
				t.Fatalf("the sample does not contain %q", m.old)
			}
			src := strings.Replace(right, m.old, m.new, 1)
			_, list := Parse("site.yaml", []byte(src), testSchema())
			if len(list) != 1 {
				t.Fatalf("got %d diagnostics, want 1:\n%s", len(list), list.Render(Sources{"site.yaml": []byte(src)}))
			}
			d := list[0]
			if got := d.Code + " " + d.Summary + ": " + d.Detail; got != m.want {
				t.Errorf("got\n%s\nwant\n%s", got, m.want)
			}
			if got := marked(t, src, d.At); got != m.mark {
				t.Errorf("marked %q, want %q", got, m.mark)
			}
			related := ""
			if len(d.Related) > 0 {
				related = marked(t, src, d.Related[0].At) + " | " + d.Related[0].Message
			}
			if related != m.related {
				t.Errorf("related %q, want %q", related, m.related)
			}
		})
	}
}
