/** Derived quantities: the same rows as fields, without a box. */
import { html, nothing, type TemplateResult } from 'lit';

import type { DerivedRow } from '../contract.js';

export function derivedTable(rows: readonly DerivedRow[]): TemplateResult | typeof nothing {
  if (rows.length === 0) {
    return nothing;
  }
  return html`<table>
    <caption class="unseen">what follows from these</caption>
    <tbody>${rows.map((d) => html`<tr data-derived=${d.id}>
      <td class="symbol">${d.symbol}</td><th scope="row">${d.name}</th><td class="number">${d.text}</td><td class="unit">${d.unit}</td></tr>`)}
    </tbody></table>`;
}
