package templates

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"gloamwright/layout/ink"
)

// pathText reads path data (W3C, Scalable Vector Graphics 1.1, chapter 8.3).
type pathText struct {
	text string
	at   int
	err  error
}

func (s *pathText) skip() {
	for s.at < len(s.text) && strings.IndexByte(" \t\r\n,", s.text[s.at]) >= 0 {
		s.at++
	}
}

func (s *pathText) done() bool {
	s.skip()
	return s.at >= len(s.text)
}

func (s *pathText) fail(format string, args ...any) {
	if s.err == nil {
		s.err = fmt.Errorf(format, args...)
	}
}

// number reads a number; 0 after a fault.
func (s *pathText) number() float64 {
	s.skip()
	i, dot, exp := s.at, false, false
	for ; i < len(s.text); i++ {
		c := s.text[i]
		switch {
		case c >= '0' && c <= '9':
		case (c == '+' || c == '-') && (i == s.at || s.text[i-1] == 'e' || s.text[i-1] == 'E'):
		case c == '.' && !dot && !exp:
			dot = true
		case (c == 'e' || c == 'E') && !exp && i > s.at:
			exp = true
		default:
			goto end
		}
	}
end:
	v, err := strconv.ParseFloat(s.text[s.at:i], 64)
	if err != nil || math.IsInf(v, 0) {
		s.fail("expected a number at %q", clipped(s.text[s.at:]))
		return 0
	}
	s.at = i
	return v
}

// flag reads 0 or 1, which may stand without a space behind it.
func (s *pathText) flag() bool {
	s.skip()
	if s.at < len(s.text) && (s.text[s.at] == '0' || s.text[s.at] == '1') {
		s.at++
		return s.text[s.at-1] == '1'
	}
	s.fail("expected 0 or 1 at %q", clipped(s.text[s.at:]))
	return false
}

func clipped(s string) string {
	const most = 12
	if len(s) > most {
		return s[:most] + "…"
	}
	return s
}

// path reads the whole text.
func (s *pathText) path() *ink.Path {
	p := &ink.Path{}
	var now, start, handle ink.Point // handle: the last control point
	var command, before byte
	point := func(relative bool) ink.Point {
		x := s.number()
		q := ink.Point{X: x, Y: s.number()}
		if relative {
			q.X, q.Y = q.X+now.X, q.Y+now.Y
		}
		return q
	}
	mirrored := func(kinds string) ink.Point {
		if strings.IndexByte(kinds, before) < 0 {
			return now
		}
		return ink.Point{X: 2*now.X - handle.X, Y: 2*now.Y - handle.Y}
	}
	for !s.done() && s.err == nil {
		c := s.text[s.at]
		if c >= 'A' && c <= 'Z' || c >= 'a' && c <= 'z' {
			command = c
			s.at++
		} else if command == 0 {
			s.fail("expected a command at %q", clipped(s.text[s.at:]))
			break
		}
		upper := command &^ 0x20
		relative := command != upper
		if before == 0 && upper != 'M' {
			s.fail("it does not begin with M")
			break
		}
		if before == 'Z' && upper != 'M' && upper != 'Z' {
			p.Move(now.X, now.Y)
		}
		switch upper {
		case 'M':
			now = point(relative)
			start = now
			p.Move(now.X, now.Y)
			command-- // further pairs are lines
		case 'L':
			now = point(relative)
			p.Line(now.X, now.Y)
		case 'H', 'V':
			v := s.number()
			at, from := &now.X, now.X
			if upper == 'V' {
				at, from = &now.Y, now.Y
			}
			if relative {
				v += from
			}
			*at = v
			p.Line(now.X, now.Y)
		case 'C', 'S':
			a := mirrored("CS")
			if upper == 'C' {
				a = point(relative)
			}
			b := point(relative)
			end := point(relative)
			p.Cubic(a, b, end)
			handle, now = b, end
		case 'Q', 'T':
			a := mirrored("QT")
			if upper == 'Q' {
				a = point(relative)
			}
			end := point(relative)
			p.Quad(a, end)
			handle, now = a, end
		case 'A':
			rx, ry := math.Abs(s.number()), math.Abs(s.number())
			s.number() // turns an ellipse; a circle stays as it is
			large, clockwise := s.flag(), s.flag()
			end := point(relative)
			switch {
			case s.err != nil:
			case math.Abs(rx-ry) > 1e-6*max(rx, ry):
				s.fail("arcs of ellipses are not drawn: turn them into curves")
			case end == now:
			case rx == 0:
				p.Line(end.X, end.Y)
			default:
				p.Arc(end, max(rx, math.Hypot(end.X-now.X, end.Y-now.Y)/2), clockwise, large)
			}
			now = end
		case 'Z':
			p.Close()
			now = start
			command = 0
			before = 'Z'
			continue
		default:
			s.fail("unknown command %q", string(command))
		}
		before = upper
	}
	return p
}
