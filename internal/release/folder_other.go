//go:build !linux

package release

import "errors"

// exchange makes two folders change places in one step, where the system can.
func exchange(a, b string) error { return errors.ErrUnsupported }
