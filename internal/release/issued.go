package release

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"os"
	"path"
	"path/filepath"
	"sort"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// Names in the folder of an issued revision, besides its documents.
const (
	descriptionFolder = "description" // the description and the shared files it reads
	registerFile      = "register.yaml"
	resultsFile       = "results.json"
	noticeFile        = "changes.json" // against the revision before; not in the first
	checksumsFile     = "checksums.sha256"
)

// Issued is one issued revision.
type Issued struct{ Revision, Dir string }

// read returns a file of the revision.
func (r *Issued) read(name string) ([]byte, error) {
	data, err := os.ReadFile(filepath.Join(r.Dir, filepath.FromSlash(name)))
	if err != nil {
		return nil, damaged("Revision %s is not whole: %v. Bring the folder %s back from version control or a backup.", r.Revision, err, r.Dir)
	}
	return data, nil
}

// checked returns a file of the revision after its checksum was found to hold.
func (r *Issued) checked(name string) ([]byte, error) {
	sums, err := r.sums()
	if err != nil {
		return nil, err
	}
	return r.verify(name, sums)
}

func (r *Issued) verify(name string, sums map[string]string) ([]byte, error) {
	data, err := r.read(name)
	if err != nil {
		return nil, err
	}
	if sum := sha256.Sum256(data); sums[name] != hex.EncodeToString(sum[:]) {
		return nil, damaged("%s is not as it was issued: its checksum differs. Bring it back from version control or a backup.", filepath.Join(r.Dir, filepath.FromSlash(name)))
	}
	return data, nil
}

func (r *Issued) sums() (map[string]string, error) {
	data, err := r.read(checksumsFile)
	if err != nil {
		return nil, err
	}
	out := map[string]string{}
	for _, line := range strings.Split(strings.TrimRight(string(data), "\r\n"), "\n") {
		sum, name, ok := strings.Cut(strings.TrimRight(line, "\r"), "  ")
		if !ok {
			return nil, damaged("%s has a line that is no checksum: %q.", filepath.Join(r.Dir, checksumsFile), line)
		}
		out[name] = sum
	}
	return out, nil
}

// Verify checks every file of the revision against its checksum.
func (r *Issued) Verify() error {
	sums, err := r.sums()
	if err != nil {
		return err
	}
	names := make([]string, 0, len(sums))
	for name := range sums {
		names = append(names, name)
	}
	sort.Strings(names)
	for _, name := range names {
		if _, err := r.verify(name, sums); err != nil {
			return err
		}
	}
	return nil
}

// texts returns the firm's texts of the revision, in the folder that its description
// names.
func (r *Issued) texts(folder string) ([]File, error) {
	sums, err := r.sums()
	if err != nil {
		return nil, err
	}
	var out []File
	within := path.Join(descriptionFolder, folder) + "/"
	for _, name := range circuit.SortedKeys(sums) {
		if !strings.HasPrefix(name, within) {
			continue
		}
		data, err := r.verify(name, sums)
		if err != nil {
			return nil, err
		}
		out = append(out, File{strings.TrimPrefix(name, descriptionFolder+"/"), data})
	}
	return out, nil
}

// record returns the results that were issued.
func (r *Issued) record() (*record, error) {
	data, err := r.checked(resultsFile)
	if err != nil {
		return nil, err
	}
	return readRecord(filepath.Join(r.Dir, resultsFile), data)
}

// site returns the description that was issued.
func (r *Issued) site(schema *describe.Schema) (*describe.Site, error) {
	sums, err := r.sums()
	if err != nil {
		return nil, err
	}
	dir := filepath.Join(r.Dir, descriptionFolder)
	name, err := r.description()
	if err != nil {
		return nil, err
	}
	src, err := r.verify(path.Join(descriptionFolder, name), sums)
	if err != nil {
		return nil, err
	}
	site, list := describe.Options{ReadFile: describe.FolderReader(dir)}.Parse(name, src, schema)
	if list.HasErrors() {
		return nil, fmt.Errorf("the description of revision %s cannot be read by this version of the program:\n%w", r.Revision, &Damaged{List: list, Sources: site.Sources})
	}
	return site, nil
}

// description returns the name of the description's file within its folder: the one
// that bears the name of the revision's folder, or the only one.
func (r *Issued) description() (string, error) {
	dir := filepath.Join(r.Dir, descriptionFolder)
	entries, err := os.ReadDir(dir)
	if err != nil {
		return "", damaged("Revision %s is not whole: %v. Bring the folder %s back from version control or a backup.", r.Revision, err, r.Dir)
	}
	var files []string
	for _, e := range entries {
		if e.IsDir() {
			continue
		}
		if stem(e.Name()) == filepath.Base(filepath.Dir(r.Dir)) {
			return e.Name(), nil
		}
		files = append(files, e.Name())
	}
	if len(files) != 1 {
		return "", damaged("%s does not tell which of its files is the description.", dir)
	}
	return files[0], nil
}

// sumOfTexts is one checksum over files: of the lines that sumsOf writes.
func sumOfTexts(files []File) string {
	sum := sha256.Sum256(sumsOf(files).Data)
	return hex.EncodeToString(sum[:])
}

// sumsOf writes the checksums of files, in the form that sha256sum reads.
func sumsOf(files []File) File {
	list := append([]File(nil), files...)
	sort.Slice(list, func(i, j int) bool { return list[i].Name < list[j].Name })
	var b bytes.Buffer
	for _, f := range list {
		sum := sha256.Sum256(f.Data)
		fmt.Fprintf(&b, "%s  %s\n", hex.EncodeToString(sum[:]), f.Name)
	}
	return File{checksumsFile, b.Bytes()}
}
