/** The page Hand over: prepares a hand-over, or, where the address carries one, shows it read-only. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import type { ReceiveResult, SendResult } from '../contract.js';
import { engine, sentences } from '../engine/client.js';
import { pageFragment, pageHref } from '../pages.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { asPeak, emptyBench } from '../tap/bench.js';
import { handOverView } from './handover-page.js';
import { caution } from './notes.js';
import { sharedStyle } from './style.js';
import { copyText, saveFile } from './table-copy.js';

/** What the text after "#" of a hand-over link begins with; anything else is a place on the page. */
const fragmentStart = 'h=';

@customElement('hoop-handover')
export class HoopHandover extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      textarea { font-family: var(--mono); font-size: 0.82em; overflow-wrap: anywhere; }
      .spec { margin-bottom: 14px; }
      .spec .symbol { width: 2.6em; }
      .spec .value { text-align: end; font-variant-numeric: tabular-nums; overflow-wrap: anywhere; white-space: pre-line; }
      .spec th { width: 46%; }
      @media print {
        :host { font-size: 8.6pt; line-height: 1.25; }
        .prepare { display: none; }
        .panel { padding: 4pt 8pt; margin-bottom: 6pt; }
        .panel, table { break-inside: auto; }
        th, td { padding: 1.2pt 4pt; }
        h2 { font-size: 11.5pt; margin: 4pt 0 2pt; }
        p, ul { margin: 0 0 3pt; }
        .note { padding: 3pt 8pt; margin: 3pt 0; max-width: none; }
        .caution { display: flex; gap: 10pt; break-inside: avoid; }
        .caution > .note-title { flex: none; align-items: start; margin: 0; }
        .specs { columns: 2; column-gap: 18pt; }
        .spec { break-inside: avoid; margin-bottom: 4pt; }
        .spec .symbol { width: 2.2em; }
      }
    `,
  ];

  @state() private sending: SendResult | null = null;
  @state() private received: ReceiveResult | null = null;
  @state() private wrong = '';
  @state() private said = '';
  private asked = '';
  private readonly sessionController: SessionController;

  constructor() {
    super();
    this.sessionController = new SessionController(this, () => void this.prepare());
  }

  private readonly readAddress = (): void => void this.receiveLink();

  override connectedCallback(): void {
    super.connectedCallback();
    addEventListener('hashchange', this.readAddress);
    this.readAddress();
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    removeEventListener('hashchange', this.readAddress);
    this.removeController(this.sessionController);
  }

  private get receiving(): boolean {
    return pageFragment().startsWith(fragmentStart);
  }

  private async receiveLink(): Promise<void> {
    if (!this.receiving) {
      this.received = null;
      this.wrong = '';
      return;
    }
    this.take(await engine.call('receive', { fragment: pageFragment(), parcel: new Uint8Array() }));
  }

  private async receiveFile(event: Event): Promise<void> {
    const file = (event.target as HTMLInputElement).files?.[0];
    if (file) {
      this.take(await engine.call('receive', { fragment: '', parcel: new Uint8Array(await file.arrayBuffer()) }));
    }
  }

  private take(answer: Awaited<ReturnType<typeof engine.call<'receive'>>>): void {
    if (answer.kind === 'result') {
      this.received = answer.result;
      this.wrong = '';
    } else if (answer.kind === 'refused') {
      this.received = null;
      this.wrong = sentences(answer);
    }
  }

  private async prepare(): Promise<void> {
    const { document } = session;
    if (!document || this.receiving) {
      return;
    }
    const bench = session.recall('tap', emptyBench());
    const peaks = bench.peaks.map(asPeak).filter((p) => p.use);
    const address = session.linkAddress || ownAddress();
    const key = JSON.stringify([document, peaks, address]);
    if (key === this.asked) {
      return;
    }
    this.asked = key;
    const answer = await engine.call('send', {
      document, address, sent: new Date().toISOString(), tapped: peaks.length > 0 ? bench.tapped : '',
      peaks: peaks.map((p) => ({ frequency: p.frequency, uncertainty: p.uncertainty, m: p.m, n: p.n })),
    }, { key: 'send' });
    if (answer.kind === 'result') {
      this.sending = answer.result;
      this.wrong = '';
    } else if (answer.kind === 'refused') {
      this.wrong = sentences(answer);
    }
  }

  private async keepCopy(): Promise<void> {
    if (!this.received) {
      return;
    }
    const answer = await session.take(await engine.store('records.create', { from: 'document', name: '', document: this.received.page.document }));
    this.said = answer.kind === 'result' ? 'A copy is kept on this device; it is open now.' : sentences(answer);
  }

  private async copyLink(): Promise<void> {
    if (this.sending) {
      this.said = (await copyText(this.sending.link)) ? 'The link is copied.' : 'This browser does not let the page copy: select the text and copy it.';
    }
  }

  private saveParcel(): void {
    if (this.sending) {
      saveFile(this.sending.fileName, this.sending.parcel, 'application/json');
      this.said = `Saved as ${this.sending.fileName}.`;
    }
  }

  protected override render(): TemplateResult {
    if (this.received) {
      return this.receivedView(this.received);
    }
    return html`
      ${this.wrong ? html`<section class="panel"><p class="error" role="alert">${this.wrong}</p>
        ${this.receiving ? html`<p>Ask the sender for the link again, or for the file.</p>${this.fileInput()}` : nothing}</section>` : nothing}
      ${this.sending && !this.receiving ? this.prepareView(this.sending) : nothing}
      ${!this.sending && !this.wrong ? html`<section class="panel"><p role="status">${this.receiving ? 'Opening the hand-over…' : session.message || 'Opening the diaphragm…'}</p></section>` : nothing}`;
  }

  private fileInput(): TemplateResult {
    return html`<label for="parcel">Open a hand-over file</label><input id="parcel" type="file" accept=".json,application/json" @change=${this.receiveFile} />`;
  }

  private receivedView(received: ReceiveResult): TemplateResult {
    const { differences } = received;
    return html`
      <section class="panel prepare" aria-label="What this is">
        <p><strong>Somebody handed this over to you.</strong> It is read-only. The figures are shown as they were sent, beside what this page computes now.
          ${differences === 0 ? 'They agree.' : ''}</p>
        ${differences > 0 ? caution(`${differences === 1 ? 'One figure differs' : `${differences} figures differ`} from what is computed now. Ask the sender which is right before you rely on it.`) : nothing}
        <div class="actions"><button type="button" class="main" id="keep-copy" @click=${() => void this.keepCopy()}>Keep a copy on this device</button>
          <button type="button" @click=${() => print()}>Print</button></div>
        <p role="status">${this.said}</p>
      </section>
      ${handOverView(received.page, true)}`;
  }

  private prepareView(sending: SendResult): TemplateResult {
    return html`
      <section class="panel prepare" aria-labelledby="link-title"><h2 id="link-title">Send it</h2>
        ${sending.addressNote ? html`<p class="note">${sending.addressNote}</p>` : nothing}
        ${sending.link ? html`
          <label for="link">Link, ${sending.length} characters</label>
          <textarea id="link" rows="4" readonly .value=${sending.link} @focus=${(e: Event) => (e.target as HTMLTextAreaElement).select()}></textarea>
          <p class="help">It carries the specification, the figures and the chosen peaks; no recordings. Anybody who has it can read it, and it is no signature.</p>`
        : html`<p class="note">A link would have ${sending.length} characters; more than ${sending.most} break on the way. Send the file, or shorten the notes.</p>`}
        <div class="actions">
          ${sending.link ? html`<button type="button" class="main" id="copy-link" @click=${() => void this.copyLink()}>Copy the link</button>` : nothing}
          <button type="button" id="save-parcel" class=${sending.link ? '' : 'main'} @click=${() => this.saveParcel()}>Save as a file</button>
          <button type="button" @click=${() => print()}>Print</button>
        </div>
        <p role="status">${this.said}</p>
        ${this.fileInput()}
      </section>
      ${handOverView(sending.page, false)}`;
  }
}

/** Address of this page, of the file where it is the single one: without query and fragment. */
function ownAddress(): string {
  const url = new URL(pageHref('hand-over'), location.href);
  url.search = '';
  url.hash = '';
  return url.href;
}
