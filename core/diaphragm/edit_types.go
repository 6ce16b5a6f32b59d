package diaphragm

// Edit is one change that a person made.
type Edit struct {
	// Field is the dotted name of the field, "sheet.thickness" or
	// "avoid.lines.0.frequency".
	Field  string `json:"field"`
	Action Action `json:"action"`
	// Text as typed or chosen.
	Text string `json:"text"`
}

// Action says what an edit does with its field.
type Action string

// The actions of an edit.
const (
	// ActionSet reads the text as the field's new value; with a unit in the
	// text the field is shown in that unit from then on.
	ActionSet Action = "set"
	// ActionUnit shows the field in the unit named by the text; the value
	// stays.
	ActionUnit Action = "unit"
	// ActionAdd appends an entry to a list: a harmonic ("tension.harmonics"), a
	// patch ("attached.patches"), a strip ("attached.strips") or a line to keep
	// clear of ("avoid.lines"). A text is its order, mass or frequency.
	ActionAdd Action = "add"
	// ActionRemove removes the entry named by the field ("avoid.lines.0").
	ActionRemove Action = "remove"
	// ActionAdopt takes over the properties of the catalogue material whose
	// id is the text (field "sheet.material").
	ActionAdopt Action = "adopt"
)

// Actions lists every action.
func Actions() []Action {
	return []Action{ActionSet, ActionUnit, ActionAdd, ActionRemove, ActionAdopt}
}

// FieldKind says how a field is edited.
type FieldKind string

// The kinds of field.
const (
	KindText     FieldKind = "text"
	KindLongText FieldKind = "long-text"
	KindQuantity FieldKind = "quantity"
	KindCount    FieldKind = "count"
	KindChoice   FieldKind = "choice"
	KindMaterial FieldKind = "material"
)

// FieldKinds lists every kind of field.
func FieldKinds() []FieldKind {
	return []FieldKind{KindText, KindLongText, KindQuantity, KindCount, KindChoice, KindMaterial}
}

// GroupName names the panel part in which a field stands.
type GroupName string

// The groups of fields in page order.
const (
	GroupIdentity     GroupName = "identity"
	GroupRing         GroupName = "ring"
	GroupSheet        GroupName = "sheet"
	GroupTension      GroupName = "tension"
	GroupEvenness     GroupName = "evenness"
	GroupAttached     GroupName = "attached"
	GroupFaces        GroupName = "faces"
	GroupSurroundings GroupName = "surroundings"
	GroupAvoid        GroupName = "avoid"
	GroupDamping      GroupName = "damping"
)

// GroupNames lists every group in page order.
func GroupNames() []GroupName {
	return []GroupName{
		GroupIdentity, GroupRing, GroupSheet, GroupTension, GroupEvenness, GroupAttached, GroupFaces, GroupSurroundings, GroupAvoid, GroupDamping,
	}
}

// Row is one field as a form shows it.
type Row struct {
	Field  string    `json:"field"`
	Group  GroupName `json:"group"`
	Symbol string    `json:"symbol"`
	Name   string    `json:"name"`
	// Help is one or two plain sentences.
	Help string    `json:"help"`
	Kind FieldKind `json:"kind"`
	// Text to show: the value in the row's unit, or the draft that could not
	// be read.
	Text string `json:"text"`
	// Echo says how the text was read where that is not obvious: "1,5 is read
	// as 1.5"; empty otherwise.
	Echo  string   `json:"echo"`
	Unit  string   `json:"unit"`
	Units []string `json:"units"`
	// Choices of a choice or material field.
	Choices []Choice `json:"choices"`
	// Optional fields may be left empty.
	Optional bool `json:"optional"`
	// Problem is the sentence to show at the field; empty when it is sound.
	Problem string `json:"problem"`
}

// Choice is one option of a field.
type Choice struct {
	Value string `json:"value"`
	Name  string `json:"name"`
}
