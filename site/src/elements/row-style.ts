/** How a field looks as a row: symbol, words, value, unit. */
import { css } from 'lit';

export const rowStyle = css`
  :host { border-bottom: 1px solid var(--rule); padding: 0.45em 0; }
  .row { display: grid; grid-template-columns: 2.1em minmax(9em, 1fr) minmax(6em, 9.5em) 6.4em; gap: 0.1em 0.7em; align-items: center; }
  .wide { grid-column: 3 / span 2; }
  .row label { display: block; }
  .help { font-size: 0.86em; line-height: 1.35; margin: 0.1em 0 0; max-width: 48ch; }
  input, select, textarea { width: 100%; }
  .said { grid-column: 2 / -1; margin: 0; }
  @media (max-width: 560px) {
    .row { grid-template-columns: 1.6em 1fr 5.6em; }
    .name { grid-column: 2 / -1; }
    .value { grid-column: 1 / 3; }
    .wide { grid-column: 1 / -1; }
  }
  @media print {
    :host { padding: 0.1em 0; }
    .help { display: none; }
  }
`;
