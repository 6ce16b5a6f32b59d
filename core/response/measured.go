package response

type fitted struct{ form }

func (f *fitted) report(n *SourceNote, peak float64) {}
