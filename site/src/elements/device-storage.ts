/** Whether the browser keeps the records: asked for, and its answer shown. */
import { html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import { askToKeep, keeping, type Keeping } from '../engine/storage.js';
import { sharedStyle } from './style.js';

@customElement('hoop-device-storage')
export class HoopDeviceStorage extends LitElement {
  static override styles = [sharedStyle];

  @state() private answer: Keeping | null = null;

  override connectedCallback(): void {
    super.connectedCallback();
    void keeping().then((answer) => { this.answer = answer; });
  }

  private async ask(): Promise<void> {
    this.answer = await askToKeep();
  }

  protected override render(): TemplateResult {
    const { answer } = this;
    return html`<section class="panel" aria-labelledby="storage-title"><h2 id="storage-title">Will this device keep them?</h2>
      <p role="status" id="storage-answer">${answer ? `${answer.words} ${answer.room}` : 'Asking the browser…'}</p>
      ${answer?.promise === 'may-go' ? html`<div class="actions"><button type="button" @click=${() => void this.ask()}>Ask the browser to keep them</button></div>` : nothing}
    </section>`;
  }
}
