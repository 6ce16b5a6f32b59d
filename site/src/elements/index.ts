// Every custom element, each defined by the module that holds it.
import './bar.js';
import './modes.js';
import './respond.js';
import './specify.js';
import './tap.js';
