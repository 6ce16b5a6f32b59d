package diaphragm

// linkDictionary1 is what the deflate window of a version 1 link begins with:
// the text of a typical parcel. It may never change, or every link that has
// been sent becomes unreadable; a better one needs a new version of the link.
// What occurs most often stands last, where a reference to it is shortest.
const linkDictionary1 = `polyester filmpolyimide filmETFE foilaluminium foiltitanium foilstainless steel foil` +
	`mains 50 Hzmains 100 Hzmains 60 Hzmains 120 Hzfan blade passing drive ` +
	`clamp ring sheet tension tapped spare window port panel cover tank inspection before after with the and for from not ` +
	`vacuumopenbaffledcavity","depth":0.` +
	`{"document":{"schema":1,"id":"01","name":"","place":"","notes":"","created":"2026-01-01T00:00:00Z","revision":1,"invented":true,` +
	`"ring":{"radius":1.5,"clamps":48,"cte":0.000012},` +
	`"sheet":{"material":"Polyester film (PET, biaxially oriented)","thickness":0.000023,"density":1390,"measuredArealDensity":0,` +
	`"e":4800000000,"nu":0.38,"cte":0.000017,"allowableStress":33000000},` +
	`"tension":{"nominal":200,"tolerance":0.1},` +
	`"faces":{"upper":{"kind":"open"},"lower":{"kind":"baffled"}},` +
	`"surroundings":{"temperature":293.15,"pressure":101325,"humidity":0.5,"serviceMin":263.15,"serviceMax":313.15},` +
	`"avoid":{"lowest":0,"lines":[{"name":"","frequency":50,"halfWidth":0.05},{"name":"","frequency":100,"halfWidth":0.03}]},` +
	`"damping":{"ratio":0.01}},` +
	`"figures":[{"id":"sheet.stress","value":0},{"id":"air.density","value":1.19},{"id":"f.0.1","value":10},{"id":"f.1.1","value":1},{"id":"f.2.1","value":2}],` +
	`"peaks":[{"frequency":10,"uncertainty":0.01,"m":0,"n":1},{"frequency":20,"uncertainty":0.02,"m":1,"n":1},{"frequency":30,"uncertainty":0.05,"m":2,"n":2}],` +
	`"tapped":"2026-01-01T00:00:00Z","sent":"2026-01-01T00:00:00Z","engine":"1.0.0"}`
