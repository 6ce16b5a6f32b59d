// Entry of the single self-contained file. Order matters: Go's loader (storage runs on this page there, not in a
// worker), then what the file carries, then the elements, then the page turned to.
import 'hoopsheet:wasm_exec';

import './single-open.js';

import './own-session.js';

import '../hoopsheet.js';

import { startOffline } from './offline.js';
import { startPrintFoot } from './print.js';
import { startTurning } from './single-turn.js';
import { startThemeChoice } from './theme.js';

startThemeChoice();
startPrintFoot();
startTurning();
void startOffline();
