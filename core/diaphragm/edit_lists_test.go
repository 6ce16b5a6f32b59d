package diaphragm

import (
	"reflect"
	"testing"
)

func TestLinesAreAddedAndRemoved(t *testing.T) {
	s := demoState().apply(Edit{"avoid.lines", ActionAdd, ""}, Edit{"avoid.lines", ActionAdd, "29,4 Hz"}, Edit{"avoid.lines", ActionAdd, "soon"})
	if len(s.doc.Avoid.Lines) != 6 || s.doc.Avoid.Lines[3] != (Line{"line 4", 100, 0.05}) || s.doc.Avoid.Lines[4].Frequency != 29.4 ||
		s.drafts["avoid.lines.5.frequency"] != "soon" {
		t.Fatalf("%+v %v", s.doc.Avoid, s.drafts)
	}
	s = s.apply(Edit{"avoid.lines.4.frequency", ActionUnit, "rpm"}, set("avoid.lines.1.halfWidth", "wide"), set("avoid.lines.0.halfWidth", "9 ‰"))
	s = s.apply(Edit{"avoid.lines.1", ActionRemove, ""})
	wantDrafts := map[string]string{"avoid.lines.4.frequency": "soon"}
	wantUnits := map[string]string{"avoid.lines.0.halfWidth": "‰", "avoid.lines.3.frequency": "rpm"}
	if len(s.doc.Avoid.Lines) != 5 || s.doc.Avoid.Lines[1].Frequency != 171 || !reflect.DeepEqual(s.drafts, wantDrafts) || !reflect.DeepEqual(s.units, wantUnits) {
		t.Errorf("%+v %v %v", s.doc.Avoid.Lines, s.drafts, s.units)
	}
	for len(s.doc.Avoid.Lines) < MostLines {
		s = s.apply(Edit{"avoid.lines", ActionAdd, "60"})
	}
	s = s.apply(Edit{"avoid.lines", ActionAdd, "60"})
	if p, told := problemAt(s.problems, "avoid.lines"); len(s.doc.Avoid.Lines) != MostLines || !told || p.Code != CodeTooMany {
		t.Errorf("%d lines, %v", len(s.doc.Avoid.Lines), s.problems)
	}
	for range MostLines {
		s = s.apply(Edit{"avoid.lines.0", ActionRemove, ""})
	}
	if len(s.doc.Avoid.Lines) != 0 || s.doc.Avoid.Lines == nil || len(s.drafts)+len(s.units) != 0 {
		t.Errorf("%+v %v %v", s.doc.Avoid, s.drafts, s.units)
	}
}
