/** The page Specify: every field of the diaphragm in groups, with what follows from them. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement } from 'lit/decorators.js';

import type { GroupName, Row } from '../contract.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { derivedTable } from './derived.js';
import './field.js';
import { cautions } from './notes.js';
import { sharedStyle } from './style.js';

const groups: readonly { readonly name: GroupName; readonly title: string }[] = [
  { name: 'identity', title: 'Name and place' },
  { name: 'ring', title: 'Ring' },
  { name: 'sheet', title: 'Sheet' },
  { name: 'tension', title: 'Tension' },
  { name: 'faces', title: 'What lies on each face' },
  { name: 'surroundings', title: 'Air and service' },
  { name: 'damping', title: 'Damping' },
];

@customElement('hoop-specify')
export class HoopSpecify extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      .line { border: 1px solid var(--rule); border-radius: var(--radius); padding: 4px 14px 8px; margin: 0 0 14px; }
      .line > header { display: flex; justify-content: space-between; align-items: center; gap: 16px; }
      .line h3 { margin: 0.4em 0; }
    `,
  ];

  constructor() {
    super();
    new SessionController(this);
  }

  protected override render(): TemplateResult {
    if (!session.document) {
      return html`<section class="panel"><p role="status">${session.message || 'Opening the diaphragm…'}</p></section>`;
    }
    return html`
      ${session.problems.length > 0 ? html`<p class="note" role="status" id="attention">
        ${session.problems.length === 1 ? 'One field needs' : `${session.problems.length} fields need`} attention;
        until then the figures use the last sound value of each.</p>` : nothing}
      ${groups.map((g) => this.group(g.name, g.title))}
      ${this.lines()}
      ${cautions(session.cautions)}`;
  }

  private group(name: GroupName, title: string): TemplateResult {
    return html`<section class="panel" aria-labelledby="g-${name}">
      <h2 id="g-${name}">${title}</h2>
      ${session.rows.filter((r) => r.group === name).map((r) => html`<hoop-field .row=${r} data-field=${r.field}></hoop-field>`)}
      ${derivedTable(session.derived.filter((d) => d.group === name))}
    </section>`;
  }

  private lines(): TemplateResult {
    const rows = session.rows.filter((r) => r.group === 'avoid');
    const lines = new Map<string, Row[]>();
    for (const row of rows) {
      const key = /^avoid\.lines\.\d+/.exec(row.field)?.[0];
      if (key !== undefined) {
        lines.set(key, [...(lines.get(key) ?? []), row]);
      }
    }
    const rest = rows.filter((r) => !r.field.startsWith('avoid.lines.'));
    return html`<section class="panel" aria-labelledby="g-avoid">
      <h2 id="g-avoid">Frequencies to keep clear of</h2>
      ${rest.map((r) => html`<hoop-field .row=${r} data-field=${r.field}></hoop-field>`)}
      ${[...lines].map(([key, fields], i) => html`<div class="line">
        <header><h3>Line ${i + 1}</h3>
          <button type="button" @click=${() => void session.edit({ field: key, action: 'remove', text: '' })}>Remove line ${i + 1}</button></header>
        ${fields.map((r) => html`<hoop-field .row=${r} data-field=${r.field}></hoop-field>`)}
      </div>`)}
      <button type="button" @click=${() => void session.edit({ field: 'avoid.lines', action: 'add', text: '' })}>Add a line</button>
    </section>`;
  }
}
