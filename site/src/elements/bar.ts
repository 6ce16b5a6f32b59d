/** The bar on top: which diaphragm, which revision, whether it is kept; and what the engine has to say. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import { engine } from '../engine/client.js';
import { SessionController } from '../session/controller.js';
import { type Keeping, session } from '../session/session.js';
import { sharedStyle } from './style.js';

const keepingWords: Readonly<Record<Keeping, string>> = {
  starting: 'opening…',
  saved: 'saved on this device',
  saving: 'saving…',
  waiting: 'not saved yet…',
  unsaveable: 'cannot be saved here',
  failed: 'not saved',
  conflict: 'changed in another tab',
};

@customElement('hoop-bar')
export class HoopBar extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      .line { display: flex; flex-wrap: wrap; align-items: center; justify-content: flex-end; gap: 2px 14px; padding: 4px 0; }
      .name { font-weight: 650; overflow-wrap: anywhere; }
      .saved { color: var(--good); }
      .trouble { color: var(--rust); font-weight: 600; }
      .said { margin: 0 0 6px; text-align: end; max-width: 80ch; margin-inline-start: auto; }
      .said button { min-height: 38px; padding: 3px 12px; }
      form { display: flex; gap: 8px; justify-content: flex-end; flex-wrap: wrap; margin: 0 0 8px; }
      form input { min-width: 16em; }
      .line button { min-height: 38px; padding: 3px 12px; }
      @media print { .line button, .said { display: none; } }
    `,
  ];

  @state() private asking = false;

  constructor() {
    super();
    new SessionController(this);
    engine.addEventListener('status', () => this.requestUpdate());
  }

  private async keep(event: Event): Promise<void> {
    event.preventDefault();
    const note = new FormData(event.target as HTMLFormElement).get('note');
    this.asking = false;
    await session.keep(typeof note === 'string' ? note : '');
    await this.updateComplete;
    // The form and its button are gone: whoever works by keyboard goes on from what they did, unless they went elsewhere.
    const { activeElement } = this.ownerDocument;
    if (!activeElement || activeElement === this.ownerDocument.body) {
      this.renderRoot.querySelector<HTMLElement>('[data-keeping]')?.focus();
    }
  }

  protected override updated(): void {
    this.renderRoot.querySelector<HTMLInputElement>('form input')?.focus();
  }

  protected override render(): TemplateResult {
    const { document, keeping } = session;
    const tone = keeping === 'saved' ? 'saved' : keeping === 'failed' || keeping === 'conflict' || keeping === 'unsaveable' ? 'trouble' : 'soft';
    return html`
      <div class="line">
        <span class="name">${document?.name ?? ''}</span>
        ${document ? html`<span class="soft">${document.revision === 0 ? 'no revision kept' : `revision ${document.revision}${session.unkept ? ', changed since' : ''}`}</span>` : nothing}
        <span class=${tone} role="status" tabindex="-1" data-keeping=${keeping} data-stamp=${session.stamp}>${keepingWords[keeping]}</span>
        ${document && keeping !== 'unsaveable' && session.unkept
          ? html`<button type="button" aria-expanded=${this.asking ? 'true' : 'false'} @click=${() => { this.asking = !this.asking; }}>Keep this revision</button>` : nothing}
      </div>
      ${this.asking ? html`<form @submit=${(e: Event) => void this.keep(e)}>
        <label class="unseen" for="note">note on this revision</label>
        <input id="note" name="note" maxlength="200" placeholder="what changed (may be left empty)" autocomplete="off" />
        <button class="main">Keep revision ${(document?.revision ?? 0) + 1}</button>
        <button type="button" @click=${() => { this.asking = false; }}>Not now</button>
      </form>` : nothing}
      ${this.said()}`;
  }

  private said(): TemplateResult | typeof nothing {
    const { compute } = engine.status;
    if (compute.state === 'failed' || compute.state === 'reload') {
      return html`<p class="said trouble" role="alert">${compute.message}
        <button type="button" @click=${() => { location.reload(); }}>Reload</button></p>`;
    }
    if (session.keeping === 'conflict') {
      return html`<p class="said trouble" role="alert">${session.message}
        <button type="button" @click=${() => void session.resolveConflict('theirs')}>Show the other tab's</button>
        <button type="button" @click=${() => void session.resolveConflict('copy')}>Keep mine as a copy</button></p>`;
    }
    if (session.message !== '') {
      return html`<p class="said ${session.keeping === 'saved' ? 'soft' : 'trouble'}" role="status">${session.message}</p>`;
    }
    if (session.shared) {
      return html`<p class="said soft" role="status">This diaphragm is open in another tab too. Changes there appear here when they are saved.</p>`;
    }
    return nothing;
  }
}
