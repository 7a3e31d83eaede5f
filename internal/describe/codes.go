package describe

// Code is a diagnostic's identifier with what it stands for.
type Code struct{ ID, Meaning string }

// The codes of diagnostics.
const (
	codeSize      = "D001"
	codeEncoding  = "D002"
	codeSyntax    = "D003"
	codeDocuments = "D004"
	codeEmpty     = "D005"
	codeComplex   = "D006"
	codeVersion   = "D007"
	codeTooMany   = "D008"

	codeShape      = "D010"
	codeUnknownKey = "D011"
	codeRepeated   = "D012"
	codeMissingKey = "D013"
	codeNoValue    = "D014"
	codeMerge      = "D015"

	codeNoUnit      = "D020"
	codeWrongUnit   = "D021"
	codeUnknownUnit = "D022"
	codeQuantity    = "D023"
	codeRange       = "D024"
	codeChoice      = "D025"
	codeVoltage     = "D026"
	codeCount       = "D027"
	codeName        = "D028"
	codeText        = "D029"

	codeUnknownName = "D030"
	codeTwice       = "D031"
	codeUnknownKind = "D032"
	codePort        = "D033"
	codeTwoSources  = "D034"
	codeLoop        = "D035"
	codeFeedsNone   = "D036"
	codeNotBoard    = "D037"
	codeSecond      = "D038"

	codeNoCircuits = "D040"
	codeNoPoints   = "D041"
	codeWay        = "D042"
	codeWays       = "D043"
	codeWas        = "D044"
	codeBranch     = "D045"
	codePoint      = "D046"
	codeUnused     = "D047"
	codeBareBoard  = "D048"

	codeShared  = "D050"
	codeColours = "D051"
	codePrice   = "D052"
)

// Codes lists every code a diagnostic can bear, for the reference.
var Codes = []Code{
	{codeSize, "file too large"},
	{codeEncoding, "character that cannot stand in a description"},
	{codeSyntax, "not valid YAML"},
	{codeDocuments, "more than one document in the file"},
	{codeEmpty, "empty file"},
	{codeComplex, "nested too deeply or too many values"},
	{codeVersion, "unknown version of the description language"},
	{codeTooMany, "too many of one thing"},
	{codeShape, "a list, a mapping or a single value in place of another"},
	{codeUnknownKey, "unknown key"},
	{codeRepeated, "key given twice"},
	{codeMissingKey, "missing key"},
	{codeNoValue, "missing value"},
	{codeMerge, "merge key"},
	{codeNoUnit, "number without a unit"},
	{codeWrongUnit, "unit of another quantity"},
	{codeUnknownUnit, "unknown unit"},
	{codeQuantity, "text that is no quantity"},
	{codeRange, "value out of range"},
	{codeChoice, "value that is not one of the choices"},
	{codeVoltage, "voltage above extra-low voltage"},
	{codeCount, "text that is no whole number"},
	{codeName, "name with a character that cannot stand in it"},
	{codeText, "text that cannot be used"},
	{codeUnknownName, "name that nothing bears"},
	{codeTwice, "name used twice"},
	{codeUnknownKind, "unknown kind"},
	{codePort, "unknown or unsuitable port"},
	{codeTwoSources, "two sources feed one thing"},
	{codeLoop, "stages or boards that feed each other in a loop"},
	{codeFeedsNone, "stage that feeds nothing"},
	{codeNotBoard, "circuit on a stage that is no board"},
	{codeSecond, "second stage of a kind of which a job has one"},
	{codeNoCircuits, "no circuits"},
	{codeNoPoints, "circuit or branch without points"},
	{codeWay, "way pinned twice, or one that the board does not have"},
	{codeWays, "more circuits than ways"},
	{codeWas, "former name claimed twice"},
	{codeBranch, "branch without a point before it"},
	{codePoint, "point that cannot be read"},
	{codeUnused, "luminaire type that no point uses"},
	{codeBareBoard, "board that nothing hangs on"},
	{codeShared, "shared file that cannot be read"},
	{codeColours, "conductor colour that cannot be used"},
	{codePrice, "price of something that is not known"},
}
