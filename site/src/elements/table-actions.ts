/** The buttons under a table: copy, CSV, JSON. */
import { html, LitElement, type TemplateResult } from 'lit';
import { customElement, property, state } from 'lit/decorators.js';

import { sharedStyle } from './style.js';
import { asCsv, asTsv, copyText, saveFile, type ShownTable } from './table-copy.js';

@customElement('hoop-table-actions')
export class HoopTableActions extends LitElement {
  static override styles = [sharedStyle];

  @property({ attribute: false }) table!: ShownTable;
  /** The full result behind the table, for JSON. */
  @property({ attribute: false }) whole: unknown = null;
  @state() private said = '';

  private async copy(): Promise<void> {
    this.said = (await copyText(asTsv(this.table))) ? 'Copied.' : 'This browser does not let the page copy; save the CSV instead.';
  }

  protected override render(): TemplateResult {
    const { table } = this;
    return html`<div class="actions">
      <button type="button" @click=${() => void this.copy()}>Copy table</button>
      <button type="button" @click=${() => saveFile(`${table.name}.csv`, asCsv(table), 'text/csv')}>Save CSV</button>
      <button type="button" @click=${() => saveFile(`${table.name}.json`, JSON.stringify(this.whole, plain, 1), 'application/json')}>Save JSON</button>
      <span role="status" class="soft">${this.said}</span>
    </div>`;
  }
}

/** Typed arrays as lists. */
function plain(_key: string, value: unknown): unknown {
  return value instanceof Float32Array ? Array.from(value) : value;
}
