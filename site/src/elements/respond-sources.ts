/** What else sets the sheet moving: any number of sources, each at its time. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, property } from 'lit/decorators.js';

import type { PulseKind, ShapeKind, SourceKind, SourceNote } from '../contract.js';
import type { Problem } from '../engine/client.js';
import { fieldOf, firstSource, hasTable, pulseNames, shapeNames, shownAs, shownFields, sourceKinds, type SourceSetup, textOf } from '../respond/sources.js';
import { figure } from './number-text.js';
import { sharedStyle } from './style.js';
import './typed.js';
import type { TypedTexts } from './typed-texts.js';

@customElement('hoop-respond-sources')
export class HoopRespondSources extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      select, textarea { width: 100%; }
      textarea { min-height: 7rem; font-family: var(--mono, monospace); }
      .source { border-top: 1px solid var(--rule); padding: 10px 0; }
      .grid { display: grid; grid-template-columns: repeat(auto-fill, minmax(min(100%, 20rem), 1fr)); gap: 0 18px; }
    `,
  ];

  @property({ attribute: false }) sources: readonly SourceSetup[] = [];
  @property({ attribute: false }) notes: readonly SourceNote[] = [];
  @property({ attribute: false }) texts: TypedTexts | null = null;
  @property({ attribute: false }) problems: readonly Problem[] = [];

  private send(sources: readonly SourceSetup[]): void {
    this.dispatchEvent(new CustomEvent('changed', { detail: sources }));
  }

  private set(i: number, change: Partial<SourceSetup>): void {
    this.send(this.sources.map((s, j) => (j === i ? { ...s, ...change } : s)));
  }

  private write(i: number, name: string, text: string): void {
    this.set(i, { texts: { ...this.sources[i]?.texts, [name]: text } });
  }

  protected override render(): TemplateResult {
    return html`
      ${this.sources.map((source, i) => this.one(source, i))}
      <label for="add">Add what sets it moving</label>
      <select id="add" @change=${this.added}>
        <option value="">choose…</option>
        ${Object.entries(sourceKinds).map(([kind, info]) => html`<option value=${kind}>${info.name}</option>`)}
      </select>`;
  }

  private readonly added = (event: Event): void => {
    const box = event.target as HTMLSelectElement;
    if (box.value !== '') {
      this.send([...this.sources, firstSource(box.value as SourceKind)]);
      box.value = '';
    }
  };

  private one(source: SourceSetup, i: number): TemplateResult {
    const kind = sourceKinds[source.kind];
    const note = this.notes[i]?.kind === source.kind ? this.notes[i] : undefined;
    const problem = (name: string): Problem | undefined => this.problems.find((p) => shownAs(p.field) === `more.${i}.${name}`);
    const said = [...shownFields(source), 'formula', 'table'];
    const rest = this.problems.filter((p) => shownAs(p.field).startsWith(`more.${i}.`) && !said.some((name) => shownAs(p.field) === `more.${i}.${name}`));
    const choice = <T extends string>(id: string, label: string, names: readonly T[], all: Readonly<Partial<Record<T, string>>>, now: T, take: (value: T) => void): TemplateResult =>
      html`<div><label for=${`${id}-${i}`}>${label}</label><select id=${`${id}-${i}`} @change=${(e: Event) => take((e.target as HTMLSelectElement).value as T)}>
        ${names.map((name) => html`<option value=${name} ?selected=${name === now}>${all[name] ?? name}</option>`)}</select></div>`;
    const table = (name: string, label: string, fault: Problem | undefined): TemplateResult => html`<label for=${`${name}-${i}`}>${label}</label>
      <textarea id=${`${name}-${i}`} spellcheck="false" .value=${textOf(source, name)} @change=${(e: Event) => this.write(i, name, (e.target as HTMLTextAreaElement).value)}></textarea>
      <input type="file" accept=".csv,.txt,text/csv,text/plain" aria-label="Take the table from a file" @change=${(e: Event) => void this.file(e, i, name)} />
      ${fault ? html`<p class="error" role="alert">${fault.message}</p>` : nothing}`;
    return html`<div class="source" role="group" aria-label=${`${i + 1}: ${kind.name}`}>
      <h3>${i + 1}: ${kind.name}</h3>
      <div class="grid">
        ${kind.shapes.length > 1 ? choice<ShapeKind>('shape', 'where', kind.shapes, shapeNames, source.shape, (shape) => this.set(i, { shape })) : nothing}
        ${kind.pulses.length > 1 ? choice<PulseKind>('pulse', 'in time', kind.pulses, pulseNames, source.pulse, (pulse) => this.set(i, { pulse })) : nothing}
        ${shownFields(source).map((name) => {
          const f = fieldOf(name);
          const field = `more.${i}.${name}`;
          return html`<hoop-typed data-field=${field} .symbol=${f.symbol} .label=${f.label} .text=${textOf(source, name)} .unit=${f.unit}
            .echo=${this.texts?.echo(field) ?? ''} .problem=${this.texts?.problem(field) || (problem(name)?.message ?? '')}
            @typed=${(e: CustomEvent<string>) => this.write(i, name, e.detail)}></hoop-typed>`;
        })}
      </div>
      ${source.shape === 'formula' ? html`<hoop-typed data-field=${`more.${i}.formula`} .symbol=${'f'} .label=${'formula in r, theta, x, y, or rho, X, Y in metres'} .text=${textOf(source, 'formula')}
        .long=${true} .problem=${problem('formula')?.message ?? ''} .offset=${problem('formula')?.offset ?? -1} @typed=${(e: CustomEvent<string>) => this.write(i, 'formula', e.detail)}></hoop-typed>` : nothing}
      ${source.kind === 'body' ? html`<label><input type="checkbox" .checked=${source.stays}
        @change=${(e: Event) => this.set(i, { stays: (e.target as HTMLInputElement).checked })} /> it stays on the sheet</label>` : nothing}
      ${source.shape === 'measured' ? table('measured', 'Measured points: a line each, x, y in mm and the value (or r, theta in degrees and the value, if the first line names them)', problem('table')) : nothing}
      ${hasTable(source) ? table('table', source.kind === 'shake' ? 'Acceleration of the ring: time in s, m/s² on each line' : 'Time in s and share of the pressure on each line', problem('table')) : nothing}
      ${rest.map((p) => html`<p class="error" role="alert">${p.message}</p>`)}
      ${note ? html`<p class="help">${note.effectiveMass ? `It meets ${figure(note.effectiveMass * 1000, 3)} g of the sheet and gives it ${figure(note.momentum ?? 0, 3)} N s. ` : ''}${
        note.outliers?.length ? `Left out: lines ${note.outliers.join(', ')}. ` : ''}${note.notes.join(' ')}</p>` : nothing}
      <button type="button" @click=${() => this.send(this.sources.filter((_, j) => j !== i))}>Remove ${kind.name}</button>
    </div>`;
  }

  private async file(event: Event, i: number, name: string): Promise<void> {
    const file = (event.target as HTMLInputElement).files?.[0];
    if (file) {
      this.write(i, name, await file.text());
    }
  }
}
