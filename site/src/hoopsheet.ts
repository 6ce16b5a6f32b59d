/**
 * What a host page includes: `<script type="module" src="hoopsheet/hoopsheet.js"></script>` defines every element.
 * It registers no service worker and leaves the page's own styles alone.
 */
import './elements/index.js';

export { buildId } from './shipped.js';
export { engine } from './engine/client.js';
