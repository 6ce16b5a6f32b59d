/** The page Specify: every field of the diaphragm in groups, with what follows from them. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import type { GroupName, Row } from '../contract.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { derivedTable } from './derived.js';
import './faces.js';
import './field.js';
import { cautions } from './notes.js';
import './own-materials.js';
import { sharedStyle } from './style.js';

interface Group {
  readonly name: GroupName;
  readonly title: string;
  /** Lists within the group: path, and what one entry is called. */
  readonly lists?: readonly { readonly path: string; readonly one: string }[];
  /** Most diaphragms leave these groups as they are. */
  readonly folded?: boolean;
}

const groups: readonly Group[] = [
  { name: 'identity', title: 'Name and place' },
  { name: 'ring', title: 'Ring' },
  { name: 'sheet', title: 'Sheet' },
  { name: 'tension', title: 'Tension' },
  { name: 'evenness', title: 'Evenness of the tension', lists: [{ path: 'tension.harmonics', one: 'harmonic' }], folded: true },
  { name: 'attached', title: 'Attached to the sheet', lists: [{ path: 'attached.patches', one: 'patch' }, { path: 'attached.strips', one: 'strip' }], folded: true },
  { name: 'faces', title: 'What lies on each face' },
  { name: 'surroundings', title: 'Air and service' },
  { name: 'damping', title: 'Damping' },
  { name: 'avoid', title: 'Frequencies to keep clear of', lists: [{ path: 'avoid.lines', one: 'line' }] },
];

@customElement('hoop-specify')
export class HoopSpecify extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      .line { border: 1px solid var(--rule); border-radius: var(--radius); padding: 4px 14px 8px; margin: 0 0 14px; }
      .line > header { display: flex; justify-content: space-between; align-items: center; gap: 16px; }
      .line h3 { margin: 0.4em 0; }
      summary { cursor: pointer; min-height: 44px; }
      summary h2 { display: inline-block; margin: 6px 0; }
    `,
  ];

  /** The entry taken out last, for as long as it can be put back. */
  @state() private removed: { readonly path: string; readonly name: string; readonly key: string; readonly fields: readonly Row[] } | null = null;

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
      ${groups.map((g) => this.group(g))}
      ${cautions(session.cautions)}`;
  }

  private group(group: Group): TemplateResult {
    const rows = session.rows.filter((r) => r.group === group.name);
    const listed = (group.lists ?? []).map((l) => ({ ...l, rows: rows.filter((r) => r.field.startsWith(`${l.path}.`)) }));
    const single = rows.filter((r) => !listed.some((l) => l.rows.includes(r)));
    const used = listed.some((l) => l.rows.length > 0 || l.path === this.removed?.path) || session.problems.some((p) => rows.some((r) => r.field === p.field));
    const body = html`${group.name === 'faces' ? html`<hoop-faces></hoop-faces>` : nothing}${single.map((r) => field(r))}
      ${listed.map((l) => this.list(l.path, l.one, l.rows))}
      ${derivedTable(session.derived.filter((d) => d.group === group.name))}
      ${group.name === 'sheet' ? html`<hoop-own-materials></hoop-own-materials>` : nothing}`;
    return html`<section class="panel" aria-labelledby="g-${group.name}">
      ${group.folded ? html`<details ?open=${used}><summary><h2 id="g-${group.name}">${group.title}</h2></summary>${body}</details>`
        : html`<h2 id="g-${group.name}">${group.title}</h2>${body}`}
    </section>`;
  }

  /** Puts the entry taken out last at the end of its list, with the texts it had. */
  private putBack(place: number): void {
    const { removed } = this;
    if (removed) {
      this.removed = null;
      void session.edit({ field: removed.path, action: 'add', text: '' }, ...removed.fields.map((row) => ({
        field: `${removed.path}.${place}${row.field.slice(removed.key.length)}`, action: 'set' as const, text: row.unit ? `${row.text} ${row.unit}` : row.text,
      })));
    }
  }

  private list(path: string, one: string, rows: readonly Row[]): TemplateResult {
    const entries = new Map<string, Row[]>();
    for (const row of rows) {
      const key = row.field.slice(0, row.field.indexOf('.', path.length + 1));
      entries.set(key, [...(entries.get(key) ?? []), row]);
    }
    return html`${[...entries].map(([key, fields], i) => html`<div class="line">
        <header><h3>${capital(one)} ${i + 1}</h3>
          <button type="button" @click=${() => { this.removed = { path, name: `${one} ${i + 1}`, key, fields }; void session.edit({ field: key, action: 'remove', text: '' }); }}>Remove ${one} ${i + 1}</button></header>
        ${fields.map((r) => field(r))}
      </div>`)}
      ${this.removed?.path === path ? html`<p class="note" role="status">${capital(this.removed.name)} is removed.
        <button type="button" @click=${() => this.putBack(entries.size)}>Undo</button></p>` : nothing}
      <div class="actions"><button type="button" @click=${() => { this.removed = null; void session.edit({ field: path, action: 'add', text: '' }); }}>Add a ${one}</button></div>`;
  }
}

function field(row: Row): TemplateResult {
  return html`<hoop-field .row=${row} data-field=${row.field}></hoop-field>`;
}

function capital(word: string): string {
  return word.charAt(0).toUpperCase() + word.slice(1);
}
