/**
 * One field as a row: symbol, words, value, unit. What is typed goes to the session at once; the text in the box stays
 * the person's own while they are in it. A problem is shown after a pause in typing, or when the box is left.
 */
import { html, LitElement, nothing, type PropertyValues, type TemplateResult } from 'lit';
import { customElement, property, state } from 'lit/decorators.js';

import type { Row } from '../contract.js';
import { session } from '../session/session.js';
import { rowStyle } from './row-style.js';
import { sharedStyle } from './style.js';

/** A problem is not shown while the person may still be typing, ms. */
const patience = 900;

@customElement('hoop-field')
export class HoopField extends LitElement {
  static override styles = [
    sharedStyle,
    rowStyle,
  ];

  @property({ attribute: false }) row!: Row;
  /** Leaves the help out where space is short; it is then the field's title. */
  @property({ type: Boolean }) terse = false;
  @state() private typed: string | null = null;
  @state() private settled = true;
  private timer: ReturnType<typeof setTimeout> | undefined;

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    clearTimeout(this.timer);
  }

  protected override updated(changed: PropertyValues<this>): void {
    const previous = changed.get('row');
    if (previous && previous.field !== this.row.field) {
      this.typed = null;
    }
  }

  private input(text: string): void {
    this.typed = text;
    this.settled = false;
    clearTimeout(this.timer);
    this.timer = setTimeout(() => { this.settled = true; }, patience);
    void session.edit({ field: this.row.field, action: 'set', text });
  }

  private leave(): void {
    clearTimeout(this.timer);
    this.settled = true;
    this.typed = null;
  }

  private choose(event: Event): void {
    const text = (event.target as HTMLSelectElement).value;
    const action = this.row.kind === 'material' ? 'adopt' : 'set';
    void session.edit({ field: this.row.field, action, text });
  }

  protected override render(): TemplateResult {
    const { row } = this;
    const problem = this.settled ? row.problem : '';
    return html`
      <div class="row">
        <span class="symbol" aria-hidden="true">${row.symbol}</span>
        <div class="name">
          <label for="box">${row.name}${row.optional ? html` <span class="unit">(may be left empty)</span>` : nothing}</label>
          ${this.terse ? nothing : html`<p class="help" id="help">${row.help}</p>`}
        </div>
        ${this.control(problem)}
        ${row.echo ? html`<p class="said" role="status">${row.echo}</p>` : nothing}
        <p class="said error" id="problem" role="alert" ?hidden=${!problem}>${problem}</p>
      </div>`;
  }

  private control(problem: string): TemplateResult {
    const { row } = this;
    const described = problem ? 'problem help' : 'help';
    switch (row.kind) {
      case 'choice':
        return html`<div class="value wide">
          <select id="box" aria-describedby=${described} @change=${this.choose}>
            ${row.choices.map((c) => html`<option value=${c.value} ?selected=${c.value === row.text}>${c.name}</option>`)}
          </select></div>`;
      case 'material':
        return html`<div class="value wide">
          <input id="box" aria-describedby=${described} .value=${this.typed ?? row.text} autocomplete="off"
            @input=${(e: Event) => this.input((e.target as HTMLInputElement).value)} @blur=${this.leave} />
          <select aria-label="take over typical figures of a material" @change=${this.choose}>
            <option value="" selected disabled>typical figures of…</option>
            ${row.choices.map((c) => html`<option value=${c.value}>${c.name}</option>`)}
          </select></div>`;
      case 'long-text':
        return html`<div class="value wide">
          <textarea id="box" rows="3" aria-describedby=${described} aria-invalid=${problem ? 'true' : 'false'} .value=${this.typed ?? row.text}
            @input=${(e: Event) => this.input((e.target as HTMLTextAreaElement).value)} @blur=${this.leave}></textarea></div>`;
      case 'text':
        return html`<div class="value wide">
          <input id="box" autocomplete="off" aria-describedby=${described} aria-invalid=${problem ? 'true' : 'false'} .value=${this.typed ?? row.text}
            @input=${(e: Event) => this.input((e.target as HTMLInputElement).value)} @blur=${this.leave} /></div>`;
      default:
        return html`
          <div class="value">
            <input id="box" class="number" inputmode="text" autocomplete="off" spellcheck="false" title=${this.terse ? row.help : nothing}
              aria-describedby=${described} aria-invalid=${problem ? 'true' : 'false'} .value=${this.typed ?? row.text}
              @input=${(e: Event) => this.input((e.target as HTMLInputElement).value)} @blur=${this.leave} />
          </div>
          ${this.units()}`;
    }
  }

  private units(): TemplateResult {
    const { row } = this;
    if (row.units.length < 2) {
      return html`<span class="unit">${row.unit}</span>`;
    }
    return html`<select aria-label="unit of ${row.name}"
        @change=${(e: Event) => void session.edit({ field: row.field, action: 'unit', text: (e.target as HTMLSelectElement).value })}>
        ${row.units.map((u) => html`<option value=${u} ?selected=${u === row.unit}>${u}</option>`)}
      </select>`;
  }
}
