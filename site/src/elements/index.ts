// Every custom element, each defined by the module that holds it.
import './bar.js';
import './compare.js';
import './handover.js';
import './modes.js';
import './numbers.js';
import './records.js';
import './respond.js';
import './specify.js';
import './start.js';
import './tap.js';
