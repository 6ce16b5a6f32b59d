// Entry of our own hosted pages: the elements, and the shell around them.
import './own-session.js';

import '../hoopsheet.js';

import { session } from '../session/session.js';
import { showCurrentChapter, startCarrying } from './links.js';
import { startOffline } from './offline.js';
import { startPrintFoot } from './print.js';
import { startThemeChoice } from './theme.js';

session.configure({ ownsAddress: true });
startThemeChoice();
startCarrying();
startPrintFoot();
showCurrentChapter();
void startOffline();
