/**
 * A row for a control of a page, which is no field of the diaphragm: symbol, words, value. What is typed goes out as
 * a `typed` event; the page has it read by the engine and hands back the echo or the problem.
 */
import { html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, property, state } from 'lit/decorators.js';

import { rowStyle } from './row-style.js';
import { sharedStyle } from './style.js';

/** A problem is not shown while the person may still be typing, ms. */
const patience = 900;

@customElement('hoop-typed')
export class HoopTyped extends LitElement {
  static override styles = [sharedStyle, rowStyle];

  @property() symbol = '';
  @property() label = '';
  @property() help = '';
  @property() text = '';
  @property() unit = '';
  @property() echo = '';
  @property() problem = '';
  /** Place of the first offending character in UTF-16 units; -1 for none. */
  @property({ type: Number }) offset = -1;
  /** Long texts take the width of value and unit. */
  @property({ type: Boolean }) long = false;
  @state() private settled = true;
  private timer: ReturnType<typeof setTimeout> | undefined;

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    clearTimeout(this.timer);
  }

  private input(event: Event): void {
    this.text = (event.target as HTMLInputElement).value;
    this.settled = false;
    clearTimeout(this.timer);
    this.timer = setTimeout(() => { this.settled = true; }, patience);
    this.dispatchEvent(new CustomEvent('typed', { detail: this.text }));
  }

  private leave(): void {
    clearTimeout(this.timer);
    this.settled = true;
  }

  protected override render(): TemplateResult {
    const problem = this.settled ? this.problem : '';
    return html`<div class="row">
      <span class="symbol" aria-hidden="true">${this.symbol}</span>
      <div class="name"><label for="box">${this.label}</label>${this.help ? html`<p class="help" id="help">${this.help}</p>` : nothing}</div>
      <div class="value ${this.long ? 'wide' : ''}">
        <input id="box" class=${this.long ? '' : 'number'} autocomplete="off" spellcheck="false" .value=${this.text}
          aria-describedby=${problem ? 'problem help' : 'help'} aria-invalid=${problem ? 'true' : 'false'} @input=${this.input} @blur=${this.leave} />
      </div>
      ${this.long ? nothing : html`<span class="unit">${this.unit}</span>`}
      ${this.echo ? html`<p class="said" role="status">${this.echo}</p>` : nothing}
      ${problem && this.offset >= 0 ? html`<pre class="said" aria-hidden="true">${this.text}\n${' '.repeat(this.offset)}▲</pre>` : nothing}
      <p class="said error" id="problem" role="alert" ?hidden=${!problem}>${problem}</p>
    </div>`;
  }
}
