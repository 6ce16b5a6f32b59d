/** The page Records: every diaphragm on this device, its revisions, the one file that holds everything, settings. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import type { ImportResult, RecordInfo, StoreMap } from '../contract.js';
import { engine, sentences } from '../engine/client.js';
import { pageHref } from '../pages.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import './device-storage.js';
import './settings.js';
import { sharedStyle } from './style.js';
import { saveFile } from './table-copy.js';
import { when } from './when.js';

@customElement('hoop-records')
export class HoopRecords extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      td .actions { margin: 0; }
      td button, td .button { min-height: 40px; padding: 4px 10px; }
      .rename { display: flex; gap: 8px; flex-wrap: wrap; }
    `,
  ];

  @state() private records: readonly RecordInfo[] = [];
  @state() private renaming = '';
  @state() private deleted: RecordInfo | null = null;
  @state() private said = '';
  @state() private wrong = '';
  private readonly changed = (): void => void this.list();

  constructor() {
    super();
    new SessionController(this);
  }

  override connectedCallback(): void {
    super.connectedCallback();
    session.addEventListener('opened', this.changed);
    session.addEventListener('kept', this.changed);
    void session.start().then(this.changed);
  }

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    session.removeEventListener('opened', this.changed);
    session.removeEventListener('kept', this.changed);
  }

  private async list(): Promise<void> {
    const answer = await engine.store('records.list', {});
    if (answer.kind === 'result') {
      this.records = answer.result.records;
    } else {
      this.wrong = sentences(answer);
    }
  }

  /** Asks the store, shows what went wrong, and lists anew. Undefined where it was refused. */
  private async ask<Name extends keyof StoreMap>(name: Name, request: StoreMap[Name]['request']): Promise<StoreMap[Name]['result'] | undefined> {
    this.wrong = '';
    this.said = '';
    const answer = await engine.store(name, request);
    if (answer.kind === 'refused') {
      this.wrong = sentences(answer);
    }
    await this.list();
    return answer.kind === 'result' ? answer.result : undefined;
  }

  private async create(from: 'demo' | 'blank'): Promise<void> {
    await session.flush();
    await session.take(await engine.store('records.create', { from, name: '', limits: session.team.team.limits }));
    await this.list();
  }

  private async duplicate(id: string): Promise<void> {
    await session.flush();
    await session.take(await engine.store('records.duplicate', { id }));
    await this.list();
  }

  private async rename(event: Event, record: RecordInfo): Promise<void> {
    event.preventDefault();
    const name = String(new FormData(event.target as HTMLFormElement).get('name') ?? '');
    this.renaming = '';
    if (record.id === session.document?.id) {
      // The one that is open is renamed as if typed, so that its working copy and this agree.
      await session.edit({ field: 'name', action: 'set', text: name });
      await session.flush();
      await this.list();
      return;
    }
    await this.ask('records.rename', { id: record.id, name });
  }

  private async deleteRecord(record: RecordInfo): Promise<void> {
    const open = record.id === session.document?.id;
    if (open) {
      await session.flush();
    }
    if (!(await this.ask('records.delete', { id: record.id }))) {
      return;
    }
    this.deleted = record;
    const next = this.records.find((r) => r.deleted === '');
    if (open) {
      await (next ? session.open(next.id) : this.create('demo'));
    }
  }

  private async restore(record: RecordInfo): Promise<void> {
    this.deleted = null;
    if (await this.ask('records.restore', { id: record.id })) {
      this.said = `${record.name} is back.`;
    }
  }

  private async exportAll(): Promise<void> {
    await session.flush();
    const file = await this.ask('archive.export', {});
    if (file) {
      saveFile(file.name, file.file, 'application/zip');
      this.said = `Everything is in ${file.name}.`;
    }
  }

  private async importFile(event: Event): Promise<void> {
    const input = event.target as HTMLInputElement;
    const file = input.files?.[0];
    if (!file) {
      return;
    }
    const done = await this.ask('archive.import', { file: new Uint8Array(await file.arrayBuffer()) });
    input.value = '';
    if (done) {
      this.said = importWords(done);
    }
  }

  private async copyRevision(number: number): Promise<void> {
    if (!session.document) {
      return;
    }
    const revision = await this.ask('records.revision', { id: session.document.id, number });
    if (revision) {
      await session.flush();
      await session.take(await engine.store('records.create', {
        from: 'document', name: `${revision.document.name}, from revision ${number}`, document: revision.document,
      }));
      await this.list();
    }
  }

  protected override render(): TemplateResult {
    const live = this.records.filter((r) => r.deleted === '');
    const gone = this.records.filter((r) => r.deleted !== '');
    return html`
      <section class="panel" aria-labelledby="list-title"><h2 id="list-title">Diaphragms on this device</h2>
        ${this.wrong ? html`<p class="error" role="alert">${this.wrong}</p>` : nothing}
        ${this.deleted ? html`<p class="note" role="status">${this.deleted.name} is deleted.
          <button type="button" id="undo" @click=${() => this.deleted && void this.restore(this.deleted)}>Undo</button></p>` : nothing}
        <p role="status">${this.said}</p>
        ${live.length > 0 ? html`<div class="table-scroll"><table id="record-table">
          <thead><tr><th scope="col">name</th><th scope="col">place</th><th scope="col">revision</th><th scope="col" class="number">taps</th><th scope="col">changed</th><th scope="col"><span class="unseen">what to do</span></th></tr></thead>
          <tbody>${live.map((r) => this.recordRow(r))}</tbody></table></div>` : html`<p>None.</p>`}
        <div class="actions">
          <button type="button" class="main" id="new" @click=${() => void this.create('blank')}>New diaphragm</button>
          <button type="button" @click=${() => void this.create('demo')}>Another demonstration</button>
        </div>
      </section>
      ${this.revisions()}
      <section class="panel" aria-labelledby="file-title"><h2 id="file-title">Everything in one file</h2>
        <p>The file holds every diaphragm, revision, tap and recording of this browser. Keep one elsewhere: browsers may clear what they keep.</p>
        <div class="actions"><button type="button" class="main" id="export" @click=${() => void this.exportAll()}>Save everything</button></div>
        <label for="import">Read a file (everything, or a hand-over)</label>
        <input id="import" type="file" accept=".zip,.json,.hoopsheet" @change=${this.importFile} />
        <p class="help">Nothing is overwritten: what is here already with other content comes in as a copy.</p>
      </section>
      <hoop-device-storage></hoop-device-storage>
      <hoop-settings></hoop-settings>
      ${gone.length > 0 ? this.goneList(gone) : nothing}`;
  }

  private recordRow(record: RecordInfo): TemplateResult {
    const open = record.id === session.document?.id;
    return html`<tr class=${open ? 'chosen' : ''} data-id=${record.id}>
      <th scope="row">${this.renaming === record.id ? html`<form class="rename" @submit=${(e: Event) => void this.rename(e, record)}>
          <label class="unseen" for="name-${record.id}">new name</label><input id="name-${record.id}" name="name" maxlength="120" .value=${record.name} autocomplete="off" />
          <button class="main">Rename</button></form>`
        : open ? html`${record.name} <span class="chip">open</span>` : html`<a href="${pageHref('specify')}" @click=${(e: Event) => this.openLink(e, record.id)}>${record.name}</a>`}</th>
      <td>${record.place}</td>
      <td>${record.revision === 0 ? 'none kept' : record.revision}${record.unkept && record.revision > 0 ? ', changed since' : ''}</td>
      <td class="number">${record.taps}</td>
      <td>${when(record.changed)}</td>
      <td><div class="actions">
        ${open ? nothing : html`<button type="button" @click=${() => void session.open(record.id)}>Open</button>`}
        <button type="button" aria-label="Duplicate ${record.name}" @click=${() => void this.duplicate(record.id)}>Duplicate</button>
        <button type="button" aria-label="Rename ${record.name}" @click=${() => { this.renaming = this.renaming === record.id ? '' : record.id; }}>Rename</button>
        <button type="button" class="grave" aria-label="Delete ${record.name}" @click=${() => void this.deleteRecord(record)}>Delete</button>
      </div></td></tr>`;
  }

  private openLink(event: Event, id: string): void {
    event.preventDefault();
    void session.open(id);
  }

  private revisions(): TemplateResult | typeof nothing {
    const { document, revisions } = session;
    if (!document) {
      return nothing;
    }
    return html`<section class="panel" aria-labelledby="revisions-title"><h2 id="revisions-title">Kept revisions of ${document.name}</h2>
      ${revisions.length === 0 ? html`<p>None yet. Typing is saved as it is; “Keep this revision” in the bar makes a numbered one that is never changed again.</p>` : html`
        <div class="table-scroll"><table id="revision-table"><thead><tr><th scope="col" class="number">revision</th><th scope="col">kept</th><th scope="col">note</th><th scope="col"></th></tr></thead>
        <tbody>${revisions.map((r) => html`<tr><th scope="row" class="number">${r.number}</th><td>${when(r.kept)}</td><td>${r.note}</td>
          <td><button type="button" @click=${() => void this.copyRevision(r.number)}>Open as a copy</button></td></tr>`)}</tbody></table></div>`}
    </section>`;
  }

  private goneList(gone: readonly RecordInfo[]): TemplateResult {
    return html`<section class="panel" aria-labelledby="gone-title"><h2 id="gone-title">Deleted</h2>
      <div class="table-scroll"><table><tbody>${gone.map((r) => html`<tr><th scope="row">${r.name}</th><td>deleted ${when(r.deleted)}</td><td><div class="actions">
        <button type="button" aria-label="Bring ${r.name} back" @click=${() => void this.restore(r)}>Bring back</button>
        <button type="button" class="grave" aria-label="Erase ${r.name} for good" @click=${() => void this.ask('records.erase', { id: r.id })}>Erase for good</button></div></td></tr>`)}</tbody></table></div>
    </section>`;
  }
}

function importWords(done: ImportResult): string {
  const parts = [
    `${done.added} diaphragm${done.added === 1 ? '' : 's'} added`,
    done.copied > 0 ? `${done.copied} came in as ${done.copied === 1 ? 'a copy' : 'copies'}` : '',
    done.same > 0 ? `${done.same} here already` : '',
    `${done.taps} tap${done.taps === 1 ? '' : 's'}`,
  ];
  return `${parts.filter((p) => p !== '').join(', ')}. ${done.notes.join(' ')}`;
}
