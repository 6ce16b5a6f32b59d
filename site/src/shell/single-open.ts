// Opens what the single file carries. A module of its own, so that it runs before the modules that use it.
import { openSingle } from '../single.js';

globalThis.HOOPSHEET_SINGLE = openSingle(document);
