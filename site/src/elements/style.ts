/**
 * The sheet that every element adopts: `static override styles = [sharedStyle, css`...`]`.
 *
 * Inside an element use its variables (--ink, --soft, --rule, --field, --paper, --panel, --up, --down, --good, ...;
 * the full list is site/styles/palette.json). They follow the page's theme, or the device's on a host page.
 * A drawing on a canvas reads them with `colour(this, 'ink')` each time it draws.
 */
import { unsafeCSS } from 'lit';

import text from '../../styles/element.css';

export const sharedStyle = unsafeCSS(text);

/** The current value of a palette colour at `at`, such as "#1c2730". */
export function colour(at: Element, name: string): string {
  return getComputedStyle(at).getPropertyValue(`--${name}`).trim();
}
