package files

import "bufio"

// Pending is a file that is written piece by piece and stands under its name only
// when it is complete.
type Pending struct {
	sys    fileSystem
	target target
	file   file
	buffer *bufio.Writer
}

// Create begins a file of the folder. Either Commit or Abandon must follow.
func (f *Folder) Create(name string) (*Pending, error) {
	sys := rootFS{root: f.root}
	t, err := settle(sys, name)
	if err != nil {
		return nil, err
	}
	return create(sys, f.opt, t)
}

func create(sys fileSystem, opt Options, t target) (*Pending, error) {
	p := &Pending{sys: sys, target: t}
	var err error
	if p.file, err = openTemp(sys, opt, &p.target); err != nil {
		return nil, err
	}
	p.buffer = bufio.NewWriterSize(p.file, chunk/16)
	return p, nil
}

// Write adds to the file.
func (p *Pending) Write(data []byte) (int, error) {
	n, err := p.buffer.Write(data)
	if err != nil {
		return n, ioError("write", p.target.path, cause(err))
	}
	return n, nil
}

// Commit completes the file and gives it its name. After an error nothing of it is
// left.
func (p *Pending) Commit() error {
	err := p.buffer.Flush()
	if err != nil {
		err = ioError("write", p.target.path, cause(err))
	}
	if closeErr := p.file.Close(); err == nil && closeErr != nil {
		err = ioError("close", p.target.path, cause(closeErr))
	}
	if err == nil {
		if err = p.sys.Rename(p.target.temp, p.target.path); err == nil {
			p.target.temp = ""
			return nil
		}
		err = ioError("rename", p.target.path, cause(err))
	}
	p.drop()
	return err
}

// Abandon leaves nothing of the file; after Commit it does nothing.
func (p *Pending) Abandon() {
	if p.target.temp != "" {
		p.file.Close()
		p.drop()
	}
}

func (p *Pending) drop() {
	p.sys.Remove(p.target.temp)
	p.target.temp = ""
}
