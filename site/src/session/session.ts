/**
 * The current diaphragm of this page: one, shared by every element on it.
 *
 * Typing goes through `edit`: edits wait in a list and go to the engine together, so that none is dropped however fast
 * they come. What comes back is the working copy; it is written to the store after a short pause, at once when the page
 * is hidden, and never over what another tab has written since.
 */
import type { Answer, Refusal, StoreAnswer } from '../engine/answer.js';
import { hasCode, sentences } from '../engine/answer.js';
import { engine } from '../engine/client.js';
import type { Diaphragm, DerivedRow, Done, Edit, EditResult, Material, OpenedRecord, Problem, RevisionInfo, Row, Saved, Settings } from '../contract.js';
import { SaveRequest } from '../shell/save-request.js';
import { addressDiaphragm, addressedDiaphragm, lastDiaphragm, rememberDiaphragm } from './remembered.js';
import { noTeam, readTeam, type TeamChoices } from './team.js';
import { Tabs, type TabNews } from './tabs.js';
import { dropUnsaved, putUnsaved, stampAfter, takeUnkept, takeUnsaved, type Unsaved } from './unsaved.js';

/** Pause after the last change before the working copy is written, ms. */
const pause = 400;

/** What the bar says about keeping. */
export type Keeping =
  | 'starting'
  /** The working copy is on this device. */
  | 'saved'
  | 'saving'
  /** Changes wait to be written. */
  | 'waiting'
  /** The browser keeps nothing here; the message says why. */
  | 'unsaveable'
  /** A write failed; the message says why, and the next change tries again. */
  | 'failed'
  /** Another tab has written since; nothing is overwritten until the person decides. */
  | 'conflict';

/** The part of the page that the session belongs to may write the address; a host page's address is left alone. */
export interface SessionOptions {
  readonly ownsAddress: boolean;
}

export class Session extends EventTarget {
  document: Diaphragm | null = null;
  rows: readonly Row[] = [];
  derived: readonly DerivedRow[] = [];
  problems: readonly Problem[] = [];
  cautions: readonly string[] = [];
  revisions: readonly RevisionInfo[] = [];
  /** True when the working copy differs from the last kept revision. */
  unkept = false;
  keeping: Keeping = 'starting';
  /** A sentence for the bar; empty when there is nothing to say. */
  message = '';
  /** True when another tab has this diaphragm open. */
  shared = false;
  settings: Settings = { chosen: false, linkAddress: '', units: 'si', by: '' };
  team: TeamChoices = noTeam;
  /** Sheet materials that were added in this browser. */
  ownMaterials: readonly Material[] = [];
  /** Number of the last state of the working copy on this device; each save makes a higher one. */
  stamp = 0;

  private drafts: Record<string, string> = {};
  private units: Record<string, string> = {};
  private desk: Record<string, string> = {};
  private kept = false;
  private waiting: Edit[] = [];
  /** Sent to the engine and not yet answered. */
  private asked: readonly Edit[] = [];
  private editing: Promise<void> | null = null;
  private saving: Promise<void> | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private dirty = false;
  private readonly tabs = new Tabs((news) => this.hear(news));
  private opening: Promise<void> | null = null;
  private options: SessionOptions = { ownsAddress: false };

  constructor() {
    super();
    document.addEventListener('visibilitychange', () => {
      if (document.visibilityState === 'hidden') {
        void this.flush();
      }
    });
    addEventListener('pagehide', () => this.leave());
    addEventListener('pageshow', (event) => event.persisted && dropUnsaved());
    addEventListener(SaveRequest.type, (event) => (event as SaveRequest).waitUntil(this.flush()));
  }

  /** Called by the site's own shell, before any element starts the session. */
  configure(options: SessionOptions): void {
    this.options = options;
    if (options.ownsAddress && this.document && this.kept) {
      addressDiaphragm(this.document.id);
    }
  }

  /** Opens the diaphragm that the address names, or the last one, or the demonstration. Later calls join the first. */
  start(): Promise<void> {
    this.opening ??= this.openFirst();
    return this.opening;
  }

  private async openFirst(): Promise<void> {
    const [settings, own, team] = await Promise.all([engine.store('settings.get', {}), engine.store('materials.list', {}), readTeam()]);
    this.ownMaterials = own.kind === 'result' ? own.result.materials : [];
    if (settings.kind === 'result') {
      this.settings = settings.result;
    }
    this.team = team;
    const asked = addressedDiaphragm();
    const id = asked || lastDiaphragm();
    if (id !== '') {
      const answer = await engine.store('records.open', { id });
      if (answer.kind === 'result') {
        await this.adopt(answer.result);
        return;
      }
      if (asked !== '' && !hasCode(answer, 'storage-refused')) {
        this.message = sentences(answer);
      }
    }
    const list = await engine.store('records.list', {});
    if (list.kind === 'refused') {
      await this.openUnsaved(list);
      return;
    }
    const newest = list.result.records.find((r) => r.deleted === '');
    const notice = this.message;
    await this.take(newest
      ? await engine.store('records.open', { id: newest.id })
      : await engine.store('records.create', { from: 'demo', name: '' }));
    if (notice !== '') {
      this.message = notice;
      this.tell();
    }
  }

  /** Works on the demonstration without keeping anything, because the browser refuses to. */
  private async openUnsaved(why: Refusal): Promise<void> {
    const demo = await engine.call('demo', {}, { quick: true });
    if (demo.kind === 'result') {
      this.document = demo.result.document;
      this.kept = false;
      this.carryOn(takeUnkept());
      this.keeping = 'unsaveable';
      this.message = sentences(why);
      await this.refresh();
      this.dispatchEvent(new Event('opened'));
      return;
    }
    this.keeping = 'failed';
    this.message = demo.kind === 'refused' ? sentences(demo) : '';
    this.tell();
  }

  /** Units that fields are first shown in: this browser's choice, else the team's. */
  get system(): Settings['units'] {
    return this.settings.chosen ? this.settings.units : this.team.team.units || this.settings.units;
  }

  /** Address that hand-over links start with, where one is chosen. */
  get linkAddress(): string {
    return this.settings.linkAddress || this.team.team.linkAddress;
  }

  /** Keeps the choices of this browser and shows fields accordingly. */
  /** Keeps the list of added materials, and offers them from now on. */
  async changeMaterials(materials: readonly Material[]): Promise<StoreAnswer<Done>> {
    const answer = await engine.store('materials.put', { materials: [...materials] });
    if (answer.kind === 'result') {
      this.ownMaterials = materials;
      await this.refresh();
      this.tell();
    }
    return answer;
  }

  async changeSettings(settings: Settings): Promise<StoreAnswer<Done>> {
    const answer = await engine.store('settings.put', settings);
    if (answer.kind === 'result') {
      this.settings = { ...settings, chosen: true };
      await this.refresh();
    }
    return answer;
  }

  /** Opens another diaphragm in this tab, after the present one is written. */
  async open(id: string): Promise<StoreAnswer<OpenedRecord>> {
    await this.flush();
    return this.take(await engine.store('records.open', { id }));
  }

  /** Makes the answer of a call that opens a record the current diaphragm. */
  async take(answer: StoreAnswer<OpenedRecord>): Promise<StoreAnswer<OpenedRecord>> {
    if (answer.kind === 'result') {
      await this.adopt(answer.result);
    } else if (hasCode(answer, 'storage-refused') && !this.document) {
      await this.openUnsaved(answer);
    } else {
      this.message = sentences(answer);
      this.tell();
    }
    return answer;
  }

  private async adopt(opened: OpenedRecord): Promise<void> {
    clearTimeout(this.timer);
    this.dirty = false;
    this.waiting = [];
    this.document = opened.document;
    this.drafts = opened.drafts;
    this.units = opened.units;
    this.desk = opened.desk;
    this.stamp = opened.stamp;
    this.unkept = opened.unkept;
    this.revisions = opened.revisions;
    this.kept = true;
    this.keeping = 'saved';
    this.message = '';
    this.tabs.open(opened.document.id);
    this.shared = this.tabs.shared;
    rememberDiaphragm(opened.document.id);
    if (this.options.ownsAddress) {
      addressDiaphragm(opened.document.id);
    }
    const unsaved = takeUnsaved(opened);
    this.carryOn(unsaved && { ...unsaved, document: { ...unsaved.document, revision: opened.document.revision }, stamp: stampAfter(unsaved, opened) });
    await this.refresh();
    this.dispatchEvent(new Event('opened'));
  }

  /** Goes on where the page before this one was left. */
  private carryOn(unsaved: Unsaved | null): void {
    if (!unsaved) {
      return;
    }
    const { document, drafts, units, desk, stamp, edits } = unsaved;
    Object.assign(this, { document, drafts, units, desk, stamp });
    if (edits.length > 0) {
      void this.edit(...edits);
    }
    this.touch();
  }

  /** The page is being left: what the store does not have yet waits in the tab for the next page. */
  private leave(): void {
    const { document, drafts, units, desk, kept, stamp } = this;
    const edits = [...this.asked, ...this.waiting];
    if (document && (this.dirty || this.saving || edits.length > 0)) {
      putUnsaved({ document, drafts, units, desk, kept, stamp, shared: this.shared || this.keeping === 'conflict', edits });
    }
    void this.flush();
  }

  /** Rows of the form for the document as it is. */
  private async refresh(): Promise<void> {
    if (this.document) {
      this.use(await this.ask([]));
    }
  }

  /** Changes fields by what was typed. Resolves when the change has been read. */
  edit(...edits: Edit[]): Promise<void> {
    this.waiting.push(...edits);
    this.editing ??= this.runEdits();
    return this.editing;
  }

  private async runEdits(): Promise<void> {
    await this.start();
    while (this.waiting.length > 0 && this.document) {
      const edits = this.waiting;
      this.waiting = [];
      this.asked = edits;
      const answer = await this.ask(edits);
      this.asked = [];
      if (answer.kind === 'superseded') {
        // The engine was restarted under the call: nothing typed is lost.
        this.waiting = [...edits, ...this.waiting];
        continue;
      }
      this.use(answer);
      if (answer.kind === 'result') {
        this.touch();
      }
    }
    this.editing = null;
  }

  private ask(edits: Edit[]): Promise<Answer<EditResult>> {
    return engine.call('edit', {
      document: this.document as Diaphragm,
      drafts: this.drafts,
      units: this.units,
      edits,
      system: this.system,
      materials: [...this.ownMaterials, ...this.team.team.materials],
    }, { quick: true });
  }

  private use(answer: Answer<EditResult>): void {
    if (answer.kind === 'result') {
      const { document, drafts, units, rows, derived, problems, cautions } = answer.result;
      Object.assign(this, { document, drafts, units, rows, derived, problems, cautions });
    } else if (answer.kind === 'refused') {
      this.message = sentences(answer);
    }
    this.tell();
  }

  /** What a page remembers of its controls for this diaphragm. */
  recall<T>(page: string, otherwise: T): T {
    const text = this.desk[page];
    if (text === undefined) {
      return otherwise;
    }
    try {
      return { ...otherwise, ...(JSON.parse(text) as T) };
    } catch {
      return otherwise;
    }
  }

  remember(page: string, state: unknown): void {
    const text = JSON.stringify(state);
    if (this.document && this.desk[page] !== text) {
      this.desk = { ...this.desk, [page]: text };
      this.touch();
    }
  }

  private touch(): void {
    this.dirty = true;
    if (!this.kept || this.keeping === 'conflict') {
      this.tell();
      return;
    }
    this.keeping = 'waiting';
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void this.flush(), pause);
    this.tell();
  }

  /** Writes the working copy now, if it waits. Resolves when the write has completed or failed. */
  async flush(): Promise<void> {
    clearTimeout(this.timer);
    if (this.editing) {
      await this.editing;
    }
    if (this.due) {
      this.saving ??= this.runSaves();
    }
    await this.saving;
  }

  /** True when there is something to write, and it may be written. */
  private get due(): boolean {
    return this.dirty && this.kept && this.document !== null && this.keeping !== 'conflict';
  }

  /** Started only when a write is due: it must not end before it is remembered as running. */
  private async runSaves(): Promise<void> {
    while (this.due && this.document) {
      clearTimeout(this.timer);
      this.dirty = false;
      this.keeping = 'saving';
      this.tell();
      const { document, drafts, units, desk, stamp } = this;
      const answer = await engine.store('records.save', { document, drafts, units, desk, stamp });
      if (!this.settle(answer)) {
        break;
      }
    }
    this.saving = null;
  }

  private settle(answer: StoreAnswer<Saved>): boolean {
    if (answer.kind === 'result') {
      this.stamp = answer.result.stamp;
      this.unkept = answer.result.unkept;
      this.keeping = this.dirty ? 'waiting' : 'saved';
      this.message = '';
      this.tabs.saved();
      this.tell();
      return true;
    }
    this.dirty = true;
    this.message = sentences(answer);
    this.keeping = hasCode(answer, 'conflict') ? 'conflict' : hasCode(answer, 'storage-refused') ? 'unsaveable' : 'failed';
    this.tell();
    return false;
  }

  /** Makes a numbered revision of the working copy. Nothing else does. */
  async keep(note: string): Promise<void> {
    await this.flush();
    if (!this.document || this.keeping !== 'saved') {
      return;
    }
    this.saving = this.sendKeep(this.document.id, note);
    await this.saving;
    if (this.due) {
      void this.flush();
    }
  }

  private async sendKeep(id: string, note: string): Promise<void> {
    const answer = await engine.store('records.keep', { id, stamp: this.stamp, note });
    while (this.editing) {
      await this.editing;
    }
    this.saving = null;
    if (answer.kind === 'result') {
      // What was typed meanwhile stays, and is saved after the revision.
      const { document, stamp, unkept, revisions } = answer.result;
      Object.assign(this, { document: { ...this.document, revision: document.revision }, stamp, revisions, unkept: unkept || this.dirty });
      this.tabs.saved();
      this.tell();
      this.dispatchEvent(new Event('kept'));
    } else {
      this.message = sentences(answer);
      this.keeping = hasCode(answer, 'conflict') ? 'conflict' : 'failed';
      this.tell();
    }
  }

  /** Ends a conflict: shows what the other tab wrote, or keeps this tab's copy as another diaphragm. */
  async resolveConflict(choice: 'theirs' | 'copy'): Promise<void> {
    const document = this.document;
    if (!document) {
      return;
    }
    await this.take(choice === 'theirs'
      ? await engine.store('records.open', { id: document.id })
      : await engine.store('records.create', { from: 'document', name: document.name, document }));
  }

  private hear(news: TabNews): void {
    this.shared = this.tabs.shared;
    const idle = !this.dirty && this.waiting.length === 0 && !this.editing && !this.saving;
    if (news.kind === 'saved' && this.document && idle) {
      void this.reload(this.document.id);
    }
    this.tell();
  }

  /** Shows what another tab has just written; this tab had nothing of its own to lose. */
  private async reload(id: string): Promise<void> {
    const answer = await engine.store('records.open', { id });
    if (answer.kind === 'result' && !this.dirty && this.waiting.length === 0 && answer.result.stamp !== this.stamp) {
      await this.adopt(answer.result);
      this.message = 'Another tab has changed this diaphragm; its changes are shown.';
      this.tell();
    }
  }

  private tell(): void {
    this.dispatchEvent(new Event('change'));
  }
}

/** The session of this page. */
export const session = new Session();
