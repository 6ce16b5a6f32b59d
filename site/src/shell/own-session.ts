// On our own pages the address says which diaphragm is open. A module of its own, so that it runs before any element
// is defined; on a host page it is not there and the address is left alone.
import { session } from '../session/session.js';

session.configure({ ownsAddress: true });
