package diaphragm

import (
	"encoding/json"
	"reflect"
	"strings"
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

// Every list works alike: its entries begin sound, with the first figure typed,
// and go with their drafts and units.
func TestEveryListAddsAndRemoves(t *testing.T) {
	typed := map[string]string{"order": "11", "mass": "0.25 oz", "frequency": "33"}
	for _, l := range lists {
		s := demoState()
		for l.count(&s.doc) > 0 {
			s = s.apply(Edit{l.at(0, ""), ActionRemove, ""})
		}
		for range l.most {
			s = s.apply(Edit{l.path, ActionAdd, ""})
		}
		if l.count(&s.doc) != l.most || len(s.problems) > 0 || len(Validate(s.doc)) > 0 {
			t.Errorf("%s: %d entries, %v", l.path, l.count(&s.doc), s.problems)
		}
		s = s.apply(Edit{l.path, ActionAdd, ""})
		if p, told := problemAt(s.problems, l.path); l.count(&s.doc) != l.most || !told || p.Code != CodeTooMany {
			t.Errorf("%s: one too many gives %v", l.path, s.problems)
		}
		if _, err := OpenDocument(mustMarshal(t, s.doc)); err != nil {
			t.Errorf("%s: a full list is not read again: %v", l.path, err)
		}
		over := cloned(s.doc)
		l.add(&over)
		if _, err := OpenDocument(mustMarshal(t, over)); codeOf(err) != CodeTooMany {
			t.Errorf("%s: a list that is too long is read: %v", l.path, err)
		}
		s = s.apply(Edit{l.at(0, ""), ActionRemove, ""}, Edit{l.path, ActionAdd, typed[l.typed]})
		f, _ := FieldByPath(l.at(l.most-1, l.typed))
		if got := f.write(&s.doc, f.unit(s.units, "si")); got != strings.TrimSuffix(typed[l.typed], " oz") || len(s.problems) > 0 {
			t.Errorf("%s: the entry added with %q holds %q, %v", l.path, typed[l.typed], got, s.problems)
		}
		// A draft and a unit of the last entry follow it to its new place.
		s = s.apply(set(l.at(l.most-1, l.typed), "plenty"))
		s = s.apply(Edit{l.at(0, ""), ActionRemove, ""})
		if s.drafts[l.at(l.most-2, l.typed)] != "plenty" || len(s.drafts) != 1 {
			t.Errorf("%s: drafts %v", l.path, s.drafts)
		}
		for l.count(&s.doc) > 0 {
			s = s.apply(Edit{l.at(0, ""), ActionRemove, ""})
		}
		if len(s.drafts)+len(s.units)+len(s.problems) > 0 {
			t.Errorf("%s: left are %v %v %v", l.path, s.drafts, s.units, s.problems)
		}
	}
}

func TestHarmonicsBeginWithAFreeOrder(t *testing.T) {
	s := demoState().apply(Edit{"tension.harmonics", ActionAdd, ""}, Edit{"tension.harmonics", ActionAdd, "4"}, Edit{"tension.harmonics", ActionAdd, ""},
		Edit{"tension.harmonics", ActionAdd, ""}, set("tension.harmonics.0.epsilon", "93"), Edit{"tension.harmonics", ActionAdd, ""})
	var orders []int
	for _, h := range s.doc.Tension.Harmonics {
		orders = append(orders, h.Order)
	}
	if !reflect.DeepEqual(orders, []int{2, 4, 3, 5, 6}) || s.doc.Tension.Harmonics[4].Epsilon > 0.01 || len(s.problems) > 0 {
		t.Errorf("%+v %v", s.doc.Tension.Harmonics, s.problems)
	}
}

func mustMarshal(t *testing.T, doc Diaphragm) []byte {
	t.Helper()
	data, err := json.Marshal(doc)
	if err != nil {
		t.Fatal(err)
	}
	return data
}
