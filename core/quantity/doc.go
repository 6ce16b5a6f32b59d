// Package quantity reads quantities as people type them ("23 um", "0.9 mil",
// "2.3 lbf/in", "1,5 mm", "3/4 in") into SI values, and writes SI values in
// the unit that a person chose.
//
// Nothing is guessed: a text that can be read in two ways is refused with a
// question, and a reading that is not obvious comes with a sentence that says
// how the text was read.
package quantity
