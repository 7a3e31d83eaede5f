package design

import (
	"errors"
	"runtime"
	"sync"
	"sync/atomic"

	"gloamwright/internal/network"
)

// sideBySide calls do for 0 to count − 1 on as many processors as there are, each with
// a network of its own; first, unless it is nil, is done before the own share of that.
// What is found does not depend on which of them does what.
func (m *maker) sideBySide(count int, first func() error, do func(n *network.Network, i int) error) error {
	q := &queue{errs: make([]error, count)}
	var wait sync.WaitGroup
	for range min(runtime.GOMAXPROCS(0)-1, count) {
		n := m.net.Apart()
		wait.Go(func() { q.work(n, do) })
	}
	var err error
	if first != nil {
		err = first()
	}
	q.work(m.net, do)
	wait.Wait()
	return errors.Join(err, errors.Join(q.errs...))
}

// queue is work to be taken in turn.
type queue struct {
	next atomic.Int64
	errs []error
}

// work does what is left of a queue.
func (q *queue) work(n *network.Network, do func(n *network.Network, i int) error) {
	for {
		i := int(q.next.Add(1)) - 1
		if i >= len(q.errs) {
			return
		}
		q.errs[i] = do(n, i)
	}
}
