package engine

// calls lists every call that the engine answers, in the order in which the
// pages use them.
func calls() []call {
	return []call{
		define("about", "Says what this engine is and which calls it answers.", runAbout),
		define("demo", "Gives the demonstration diaphragm, whose data are invented.", runDemo),
		define("read", "Reads typed quantities such as \"0.9 mil\" into SI values.", runRead),
		define("check", "Computes published values again and compares them.", runCheck),
		define("team", "Reads the file defaults.json that a team puts beside the pages.", runTeam),
		define("materials", "Gives the catalogue of sheet materials: typical figures, with the source of each.", runMaterials),
		define("edit", "Changes fields of a diaphragm by what was typed, and gives the rows of its form.", runEdit),
		define("modes", "Lists the modes of the diaphragm as it stands, with damping and the distance to the lines to keep clear of.", runModes),
		define("costs", "Says what each effect does to one mode, and what its frequency is most sensitive to.", runCosts),
		define("compare", "Holds a diaphragm against another: what differs in its modes and in its specification.", runCompare),
		define("shape", "Draws one mode: raster, section, nodal lines and lobes.", runShape),
		define("respond", "Computes the motion after initial values: frames, histories, largest travel, missed energy.", runRespond),
		define("frames", "Gives frames of a motion at the times wanted, for a replay that draws them as they come.", runFrames),
		define("peaks", "Reads a WAV recording and finds its ringing lines.", runPeaks),
		define("tap", "Matches peaks to modes and gives the tension, its spread and the verdict.", runTap),
		define("send", "Makes the hand-over of a diaphragm: figures, link and file.", runSend),
		define("receive", "Opens a hand-over and compares its figures with those computed now.", runReceive),
	}
}
