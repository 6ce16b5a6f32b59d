// Runs before the first paint, as a classic script of its own, so that neither theme nor frame flickers.
import { applyTheme, storedTheme } from './theme-store.js';

applyTheme(storedTheme());
if (new URLSearchParams(location.search).has('frame')) {
  document.documentElement.classList.add('framed');
}
