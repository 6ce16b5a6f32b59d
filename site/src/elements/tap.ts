/** The page Tap: listen, read, act. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import type { Match, PeaksResult, TapResult, TapSession } from '../contract.js';
import { engine, sentences } from '../engine/client.js';
import { SessionController } from '../session/controller.js';
import { session } from '../session/session.js';
import { asPeak, type Bench, type BenchPeak, emptyBench, keptPeaks, offered } from '../tap/bench.js';
import './listen.js';
import type { Recorded } from './listen.js';
import { figure, percent } from './number-text.js';
import './spectrum.js';
import { sharedStyle } from './style.js';
import './table-actions.js';
import { tapResult } from './tap-result.js';
import type { ShownTable } from './table-copy.js';
import './typed.js';
import { TypedTexts } from './typed-texts.js';
import { when } from './when.js';

const temperatureItems = [
  { field: 'airTemperature', name: 'air temperature', symbol: 't' },
  { field: 'sheetTemperature', name: 'sheet temperature', symbol: 't' },
] as const;

@customElement('hoop-tap')
export class HoopTap extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      .step { display: inline-grid; place-items: center; width: 1.7em; height: 1.7em; border-radius: 50%; border: 2px solid var(--ink); margin-inline-end: 0.4em; font-size: 0.8em; }
      .answer { font-size: 1.5em; font-family: var(--serif); margin: 0.2em 0; }
      .pin { width: 7.5em; }
      .typed { display: flex; gap: 10px; flex-wrap: wrap; align-items: end; }
      .typed input { width: 9em; }
      tr.aside td, tr.aside th { color: var(--soft); }
      summary { min-height: 44px; padding: 9px 0; cursor: pointer; color: var(--teal); }
      @media (max-width: 560px) { .less { display: none; } th, td { padding-inline: 4px; } .pin { width: 6em; } }
    `,
  ];

  @state() private bench: Bench = emptyBench();
  @state() private found: PeaksResult | null = null;
  @state() private result: TapResult | null = null;
  @state() private wrong = '';
  @state() private typedWrong = '';
  @state() private said = '';
  @state() private sessions: readonly TapSession[] = [];
  @state() private deleted: { session: TapSession; recording: Uint8Array } | null = null;
  @state() private working = false;
  private recording: Uint8Array = new Uint8Array();
  private asked = '';
  private readonly texts = new TypedTexts();

  constructor() {
    super();
    new SessionController(this, () => void this.compute());
    session.addEventListener('opened', this.onOpened);
  }

  override connectedCallback(): void {
    super.connectedCallback();
    if (session.document) {
      this.onOpened();
    }
  }

  private readonly onOpened = (): void => {
    this.bench = session.recall('tap', emptyBench());
    this.found = null;
    this.recording = new Uint8Array();
    void this.compute();
    void this.list();
    if (this.bench.session !== '' && this.bench.recordingName !== '') {
      void this.reopenRecording(this.bench.session);
    }
  };

  private change(change: Partial<Bench>): void {
    this.bench = { ...this.bench, ...change };
    session.remember('tap', this.bench);
    void this.compute();
  }

  private changePeak(index: number, change: Partial<BenchPeak>): void {
    this.change({ peaks: this.bench.peaks.map((p, i) => (i === index ? { ...p, ...change } : p)) });
  }

  /** A new recording replaces the bench. One from the microphone is kept at once: it cannot be had again. */
  private async recorded(event: CustomEvent<Recorded>): Promise<void> {
    const { wav, name, microphone } = event.detail;
    this.recording = wav;
    if (!(await this.analyse(0))) {
      return;
    }
    this.change({ tapped: new Date().toISOString(), session: '', recordingName: name, microphone });
    if (microphone !== '') {
      await this.keep();
    }
  }

  /** Reads a strike of the recording (0: the first). */
  private async analyse(tap: number): Promise<boolean> {
    this.wrong = '';
    this.working = true;
    const answer = await engine.call('peaks', { recording: this.recording, lowest: 0, highest: 0, most: 0, tap, displayPoints: 0 }, { key: 'peaks' });
    this.working = false;
    if (answer.kind === 'refused') {
      this.wrong = sentences(answer);
    }
    if (answer.kind !== 'result') {
      return false;
    }
    this.found = answer.result;
    this.change({ peaks: offered(answer.result.peaks) });
    return true;
  }

  private async reopenRecording(id: string): Promise<void> {
    const answer = await engine.store('taps.recording', { id });
    if (answer.kind !== 'result' || answer.result.recording.length === 0) {
      return;
    }
    this.recording = answer.result.recording;
    const peaks = await engine.call('peaks', { recording: this.recording, lowest: 0, highest: 0, most: 0, tap: 0, displayPoints: 0 }, { key: 'peaks' });
    if (peaks.kind === 'result') {
      this.found = peaks.result;
    }
  }

  private async compute(): Promise<void> {
    await this.texts.read(temperatureItems.filter((t) => this.bench[t.field].trim() !== '').map((t) => ({
      field: t.field, name: t.name, text: this.bench[t.field], dimension: 'temperature', unit: '°C', low: 173.15, high: 423.15,
    })), 'tap-texts');
    const { document } = session;
    const peaks = this.bench.peaks.map(asPeak);
    if (!document || !peaks.some((p) => p.use)) {
      this.result = null;
      this.asked = '';
      return;
    }
    // The air that moved with the sheet is that of the tap, where it is told.
    const air = this.texts.value('airTemperature');
    const request = { document: air > 0 ? { ...document, surroundings: { ...document.surroundings, temperature: air } } : document, peaks };
    const asked = JSON.stringify(request);
    if (asked === this.asked) {
      return;
    }
    this.asked = asked;
    const answer = await engine.call('tap', request, { key: 'tap' });
    if (answer.kind === 'result') {
      this.result = answer.result;
      this.wrong = '';
    } else if (answer.kind === 'refused') {
      this.result = null;
      this.wrong = sentences(answer);
    }
  }

  private async addTyped(event: Event): Promise<void> {
    event.preventDefault();
    const form = event.target as HTMLFormElement;
    const text = String(new FormData(form).get('frequency') ?? '');
    const answer = await engine.call('read', { items: [{ field: 'peak', name: 'frequency', text, dimension: 'frequency', unit: 'Hz', low: 1, high: 20000 }] }, { quick: true });
    const reading = answer.kind === 'result' ? answer.result.readings[0] : undefined;
    this.typedWrong = reading?.problem ?? '';
    if (!reading || reading.problem !== '') {
      return;
    }
    form.reset();
    const peak: BenchPeak = { frequency: reading.value, uncertainty: 0, level: 0, use: true, m: 0, n: 0, ringDown: 0, kind: 'typed' };
    this.change({
      peaks: [...this.bench.peaks, peak].sort((a, b) => a.frequency - b.frequency),
      tapped: this.bench.tapped || new Date().toISOString(),
    });
  }

  private async list(): Promise<void> {
    if (session.document) {
      const answer = await engine.store('taps.list', { id: session.document.id });
      this.sessions = answer.kind === 'result' ? answer.result.sessions : [];
    }
  }

  /** Keeps the tap, or what has changed on a kept one. */
  private async keep(): Promise<void> {
    const { document } = session;
    if (!document) {
      return;
    }
    await this.compute();
    const { bench } = this;
    const best = this.result?.readings[0];
    const matches = new Map((best?.matches ?? []).map((m) => [m.peak, m]));
    const answer = await engine.store('taps.put', {
      session: {
        id: bench.session,
        diaphragm: document.id,
        revision: document.revision,
        taken: bench.tapped,
        by: bench.by || session.settings.by,
        instrument: bench.instrument,
        notes: bench.notes,
        airTemperature: this.texts.value('airTemperature'),
        sheetTemperature: this.texts.value('sheetTemperature'),
        peaks: bench.peaks.flatMap((p, i) => (p.use ? [{ frequency: p.frequency, uncertainty: p.uncertainty, m: matches.get(i)?.m ?? p.m, n: matches.get(i)?.n ?? p.n }] : [])),
        tension: best?.tension ?? 0,
        standardUncertainty: best?.standardUncertainty ?? 0,
        verdict: this.result?.verdict ?? '',
        engine: engine.version,
        recordingName: bench.recordingName,
        microphone: bench.microphone,
      },
      recording: this.recording,
    });
    if (answer.kind === 'result') {
      this.said = 'Kept on this device.';
      this.change({ session: answer.result.id });
      await this.list();
    } else {
      this.said = sentences(answer);
    }
  }

  private async openKept(kept: TapSession): Promise<void> {
    this.found = null;
    this.recording = new Uint8Array();
    this.change({
      peaks: keptPeaks(kept), tapped: kept.taken, session: kept.id, recordingName: kept.recordingName, microphone: kept.microphone,
      by: kept.by, instrument: kept.instrument, notes: kept.notes,
      airTemperature: kept.airTemperature > 0 ? `${kept.airTemperature} K` : '', sheetTemperature: kept.sheetTemperature > 0 ? `${kept.sheetTemperature} K` : '',
    });
    if (kept.recordingName !== '') {
      await this.reopenRecording(kept.id);
    }
  }

  private async deleteKept(kept: TapSession): Promise<void> {
    const answer = await engine.store('taps.delete', { id: kept.id });
    if (answer.kind === 'result') {
      this.deleted = answer.result;
      if (this.bench.session === kept.id) {
        this.change({ session: '' });
      }
      await this.list();
    } else {
      this.said = sentences(answer);
    }
  }

  private async putBack(): Promise<void> {
    if (this.deleted) {
      const answer = await engine.store('taps.put', this.deleted);
      this.said = answer.kind === 'result' ? 'Put back.' : sentences(answer);
      this.deleted = null;
      await this.list();
    }
  }

  protected override render(): TemplateResult {
    if (!session.document) {
      return html`<section class="panel"><p role="status">${session.message || 'Opening the diaphragm…'}</p></section>`;
    }
    return html`
      <section class="panel" aria-labelledby="listen"><h2 id="listen"><span class="step" aria-hidden="true">1</span>Listen</h2>
        <hoop-listen @recorded=${this.recorded}></hoop-listen>
        ${this.working ? html`<p role="status">Reading the recording…</p>` : nothing}
        ${this.wrong ? html`<p class="error" role="alert">${this.wrong}</p>` : nothing}
      </section>
      <section class="panel" aria-labelledby="read"><h2 id="read"><span class="step" aria-hidden="true">2</span>Read</h2>
        ${this.found ? this.recordingView(this.found) : nothing}
        ${this.peakTable()}
        <form class="typed" @submit=${this.addTyped}>
          <div><label for="frequency">A peak from another instrument</label><br /><input id="frequency" name="frequency" class="number" autocomplete="off" placeholder="127.4 Hz" /></div>
          <button>Add the peak</button>
        </form>
        ${this.typedWrong ? html`<p class="error" role="alert">${this.typedWrong}</p>` : nothing}
      </section>
      <section class="panel" aria-labelledby="act"><h2 id="act"><span class="step" aria-hidden="true">3</span>Act</h2>
        ${this.result ? tapResult(this.result) : html`<p>Record a tap, open a recording or type a peak: the tension appears here.</p>`}
      </section>
      ${this.keeping()}`;
  }

  private recordingView(found: PeaksResult): TemplateResult {
    return html`<p>${found.format}, ${found.rate} Hz, ${found.channels === 1 ? 'one channel' : `${found.channels} channels`}, ${figure(found.length, 3)} s.
        ${found.strikes.length === 1 ? 'One tap found.' : `${found.strikes.length} taps found.`}</p>
      ${found.strikes.length > 1 ? html`<label>Tap that is read
        <select @change=${(e: Event) => void this.analyse(Number((e.target as HTMLSelectElement).value))}>
          ${found.strikes.map((at, i) => html`<option value=${i + 1} ?selected=${i + 1 === found.tap}>${i + 1}, at ${figure(at, 3)} s</option>`)}
        </select></label>` : nothing}
      ${found.notes.map((n) => html`<p class="note">${n}</p>`)}
      <hoop-spectrum .result=${found} .frequencies=${this.bench.peaks.map((p) => p.frequency)}></hoop-spectrum>`;
  }

  private peakTable(): TemplateResult {
    const { peaks } = this.bench;
    if (peaks.length === 0) {
      return html`<p>No peaks yet.</p>`;
    }
    const matches = new Map((this.result?.readings[0]?.matches ?? []).map((m) => [m.peak, m]));
    const table: ShownTable = {
      name: 'peaks',
      heads: ['peak', 'used', 'frequency, Hz', 'standard uncertainty, Hz', 'level, dB', 'rings for 60 dB, s', 'kind', 'm', 'n', 'tension of it alone, N/m'],
      rows: peaks.map((p, i) => {
        const m = matches.get(i);
        return [i + 1, p.use ? 'yes' : 'no', p.frequency, p.uncertainty, p.level, p.ringDown, p.kind, m?.m ?? '', m?.n ?? '', m?.tension ?? ''];
      }),
    };
    return html`<div class="table-scroll"><table id="peak-table">
        <thead><tr><th scope="col">peak</th><th scope="col" class="number">frequency</th><th scope="col" class="number less">level</th>
          <th scope="col" class="number less">rings 60 dB</th><th scope="col">read as (<var>m</var>, <var>n</var>)</th><th scope="col" class="number">off by</th></tr></thead>
        <tbody>${peaks.map((p, i) => this.peakRow(p, i, matches.get(i)))}</tbody>
      </table></div>
      <hoop-table-actions .table=${table} .whole=${peaks}></hoop-table-actions>`;
  }

  private peakRow(peak: BenchPeak, index: number, match: Match | undefined): TemplateResult {
    const pinned = peak.n > 0 ? `${peak.m}, ${peak.n}` : '';
    return html`<tr class=${peak.use ? '' : 'aside'}>
      <th scope="row"><label><input type="checkbox" .checked=${peak.use} @change=${(e: Event) => this.changePeak(index, { use: (e.target as HTMLInputElement).checked })} />
        ${index + 1}<span class="unseen"> is used</span></label></th>
      <td class="number">${figure(peak.frequency, 5)} Hz${peak.uncertainty > 0 ? html` <span class="soft less">± ${figure(peak.uncertainty, 2)}</span>` : nothing}
        ${peak.kind === 'steady' ? html`<br /><span class="chip">steady tone</span>` : peak.kind === 'typed' ? html`<br /><span class="chip">typed</span>` : nothing}</td>
      <td class="number less">${figure(peak.level, 2)} dB</td>
      <td class="number less">${peak.ringDown > 0 ? `${figure(peak.ringDown, 2)} s` : '–'}</td>
      <td><label class="unseen" for="pin-${index}">mode of peak ${index + 1}</label>
        <select class="pin" id="pin-${index}" ?disabled=${!peak.use} @change=${(e: Event) => this.pin(index, (e.target as HTMLSelectElement).value)}>
          <option value="" ?selected=${pinned === ''}>${match && pinned === '' ? `(${match.m}, ${match.n})${match.upper ? ' upper' : ''}` : 'by itself'}</option>
          ${this.pinChoices().map((c) => html`<option value=${c} ?selected=${c === pinned}>is (${c})</option>`)}
        </select></td>
      <td class="number">${match ? percent(match.residual, 2, true) : '–'}</td>
    </tr>`;
  }

  private pinChoices(): string[] {
    const choices: string[] = [];
    for (let m = 0; m <= 9; m++) {
      for (let n = 1; n <= 4; n++) {
        choices.push(`${m}, ${n}`);
      }
    }
    return choices;
  }

  private pin(index: number, text: string): void {
    const [m, n] = text === '' ? [0, 0] : text.split(',').map(Number);
    this.changePeak(index, { m: m ?? 0, n: n ?? 0 });
  }

  private keeping(): TemplateResult {
    const { bench } = this;
    const row = (field: 'by' | 'instrument' | 'notes' | 'airTemperature' | 'sheetTemperature', label: string, long: boolean, symbol = ''): TemplateResult =>
      html`<hoop-typed .symbol=${symbol} .label=${label} .text=${bench[field]} .unit=${long ? '' : '°C'} .long=${long}
        .problem=${this.texts.problem(field)} .echo=${this.texts.echo(field)} @typed=${(e: CustomEvent<string>) => this.change({ [field]: e.detail })}></hoop-typed>`;
    return html`<section class="panel" aria-labelledby="kept"><h2 id="kept">Keep this tap</h2>
      ${row('by', 'tapped by', true)}
      ${row('instrument', 'instrument', true)}
      ${temperatureItems.map((t) => row(t.field, `${t.name} at the tap`, false, t.symbol))}
      ${row('notes', 'notes', true)}
      ${bench.microphone ? html`<p class="soft">Microphone: ${bench.microphone}.</p>` : nothing}
      <div class="actions"><button type="button" class="main large" id="keep-tap" ?disabled=${bench.peaks.length === 0} @click=${() => void this.keep()}>
        ${bench.session === '' ? 'Keep this tap' : 'Keep the changes'}</button></div>
      <p role="status">${this.said}</p>
      ${this.deleted ? html`<p class="note" role="status">The tap of ${when(this.deleted.session.taken)} is deleted. <button type="button" @click=${() => void this.putBack()}>Undo</button></p>` : nothing}
      ${this.sessions.length > 0 ? html`<h3>Kept taps of this diaphragm</h3><div class="table-scroll"><table id="kept-taps">
        <thead><tr><th scope="col">taken</th><th scope="col" class="number">tension</th><th scope="col">verdict</th><th scope="col" class="less">by</th><th scope="col"></th></tr></thead>
        <tbody>${this.sessions.map((s) => html`<tr class=${s.id === bench.session ? 'chosen' : ''}><th scope="row">${when(s.taken)}</th>
          <td class="number">${s.tension > 0 ? `${figure(s.tension, 4)} N/m` : '–'}</td><td>${s.verdict}</td><td class="less">${s.by}</td>
          <td><button type="button" @click=${() => void this.openKept(s)}>Open</button> <button type="button" class="grave" @click=${() => void this.deleteKept(s)}>Delete</button></td></tr>`)}</tbody>
      </table></div>` : nothing}
    </section>`;
  }
}
