package templates

// Conditions lists what a text can be printed for, with what each means. "never" holds
// for no job: its line is printed with the reason alone.
var Conditions = []Word{
	{"mains", "a part is fed from the mains"},
	{"battery", "there is a battery"},
	{"gas", "the battery gives off hydrogen"},
	{"liquid", "its electrolyte is liquid"},
	{"lithium", "its cells are lithium"},
	{"isolator", "there is an isolator"},
	{"charger", "there is a charger"},
	{"probe", "the charger has a temperature probe"},
	{"cut-off", "there is a low-voltage cut-off"},
	{"relay", "there is a changeover relay"},
	{"suppressor", "a diode or suppressor sits across its coil"},
	{"regulator", "a linear regulator carries load"},
	{"big-capacitor", "there is a capacitor of 1 mF or more"},
	{"polarised", "lamps have electronics or LEDs"},
	{"comes-on", "lights come on by themselves"},
	{"outage-night", "the condition mains off, dark is printed"},
	{"labels", "the packet holds label sheets"},
	{"red-line", "the packet holds a red-line sheet"},
	{"never", "never"},
}

// Values lists the figures and names that can stand in braces, with what each is.
var Values = []Word{
	{"job-number", "number of the job"},
	{"revision", "revision letter"},
	{"nominal", "nominal voltage"},
	{"highest", "highest voltage that the system reaches"},
	{"outage", "outage asked for"},
	{"battery-room", "temperatures of the battery's room"},
	{"lamp-drop", "drop that is permitted"},
	{"positive", "colour code of positive wires"},
	{"negative", "colour code of negative wires"},
	{"positive-word", "the same as a word"},
	{"negative-word", "the same as a word"},
	{"mains-parts", "parts fed from the mains"},
	{"mains-volt", "voltage of the mains"},
	{"battery", "designation of the battery"},
	{"battery-short", "current of a short across the battery's poles"},
	{"cells", "kind of cells"},
	{"main-fuse", "designation of the main fuse"},
	{"air", "flow of air that the battery needs"},
	{"opening", "free area of each opening of its box"},
	{"isolator", "designation of the isolator"},
	{"charger", "designation of the charger"},
	{"charger-float", "its float voltage"},
	{"probe", "designation of its temperature probe"},
	{"relay", "designation of the changeover relay"},
	{"suppressor", "designation of the part across its coil"},
	{"regulator", "designation of the linear regulator"},
	{"big-capacitor", "designation of the large capacitor"},
	{"lamp-count", "number of lamps"},
	{"fuse-count", "number of fuses"},
	{"worst-lamp", "lamp with the greatest drop"},
	{"tp-charger", "test point at the charger"},
	{"tp-battery", "test point at the battery"},
	{"band-charger", "its reading with mains on"},
	{"band-battery", "reading at the rested battery"},
	{"load-band", "current of all lights, mains off and dark"},
	{"n-end", "number of the condition end of discharge"},
	{"n-cut-off", "number of the condition cut off"},
	{"n-outage-night", "number of the condition mains off, dark"},
	{"expect-end", "what the condition end of discharge shows"},
	{"expect-cut-off", "what the condition cut off shows"},
}

// Repeats lists what a line of the checklist can be repeated for, and the values that
// it then has besides Values.
var Repeats = []Repeat{
	{"board", []Word{{"board-title", "its name"}, {"board-plus", "its positive bar"}, {"board-minus", "its negative bar"}, {"board-ways", "number of its lighting circuits"}}},
	{"loop", []Word{{"loop-name", "the run"}, {"loop-from", "terminals to measure at"}, {"loop-to", "terminals to join"}, {"loop-band", "resistance to expect"}}},
	{"condition", []Word{{"condition-number", "its number"}, {"condition-name", "its name"}, {"condition-expect", "what is then to be seen"}}},
	{"threshold", []Word{{"threshold-name", "what happens"}, {"threshold-band", "where it is to happen"}, {"threshold-unit", "unit"}}},
}

// Word is a name and what it means.
type Word struct{ Name, Means string }

// Repeat is something a line can be repeated for.
type Repeat struct {
	Name   string
	Values []Word
}

// Functions are the words that lead to a place of the packet: {sheet wire-runs},
// {line lamp-polarity}. Sheet begins a sentence; first is the number alone.
var Functions = []string{"sheet", "Sheet", "first", "line"}

// Signals are the signal words of cautions, the gravest first.
var Signals = []string{"danger", "warning", "caution", "notice"}
