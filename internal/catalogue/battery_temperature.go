package catalogue

// leadAcidSize is IEEE 485 table 1: cell size correction for the temperature of the
// electrolyte, reference 25 °C. Three lines were seen in a table that repeats it,
// the rest is from memory. The two coldest lines stand outside the table: −6.7 °C
// from a sizing note that was read, −17.8 °C from the capacity of 40 % in
// TM 10-6140-200-14.
var leadAcidSize = []TempPoint{
	{-17.8, 2.500}, {-6.7, 1.590},
	{-3.9, 1.520}, {-1.1, 1.430}, {1.7, 1.350}, {4.4, 1.300}, {7.2, 1.250}, {10.0, 1.190},
	{12.8, 1.150}, {15.6, 1.110}, {18.3, 1.080}, {18.9, 1.072}, {19.4, 1.064}, {20.0, 1.056},
	{20.6, 1.048}, {21.1, 1.040}, {21.7, 1.034}, {22.2, 1.029}, {22.8, 1.023}, {23.4, 1.017},
	{23.9, 1.011}, {24.5, 1.006}, {25.0, 1.000}, {25.6, 0.994}, {26.1, 0.987}, {26.7, 0.980},
	{27.2, 0.976}, {27.8, 0.972}, {28.3, 0.968}, {28.9, 0.964}, {29.4, 0.960}, {32.2, 0.940},
	{35.0, 0.930}, {37.8, 0.910}, {40.6, 0.890}, {43.3, 0.880}, {46.1, 0.870}, {48.9, 0.860}, {51.7, 0.850},
}

var leadAcidSizeEvi = Evidence{Source: "IEEE 485 table 1", Note: "lines at 4.4, 10.0, 15.6 and 21.1 °C seen"}

// nickelSize are size factors for nickel cells. IEEE 1115 leaves them to the maker;
// these are typical of pocket-plate cells, from memory.
var nickelSize = []TempPoint{
	{-30, 1.80}, {-20, 1.43}, {-10, 1.25}, {0, 1.14}, {10, 1.06}, {20, 1.02}, {25, 1.00}, {40, 1.00},
}

var nickelSizeEvi = Evidence{Source: "IEEE 1115, typical maker's factors", Note: "take the maker's figures where known"}

// lithiumSize are size factors for lithium iron phosphate cells, typical of the
// class, from memory.
var lithiumSize = []TempPoint{{-20, 1.80}, {-10, 1.43}, {0, 1.18}, {10, 1.05}, {25, 1.00}, {45, 1.00}}

var lithiumSizeEvi = Evidence{Source: "typical datasheets of the class"}
