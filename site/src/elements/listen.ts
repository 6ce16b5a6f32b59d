/** Step one on site: record a tap, or open a recording. Sends `recorded` with the file. */
import { css, html, LitElement, nothing, type TemplateResult } from 'lit';
import { customElement, state } from 'lit/decorators.js';

import { longestTake, microphoneObstacle, Recorder } from '../capture/recorder.js';
import { figure } from './number-text.js';
import { sharedStyle } from './style.js';

export interface Recorded {
  readonly wav: Uint8Array;
  readonly name: string;
  /** What the browser applied; empty for a file. */
  readonly microphone: string;
}

/** Files larger than this are not opened, bytes. */
const largestFile = 200e6;

@customElement('hoop-listen')
export class HoopListen extends LitElement {
  static override styles = [
    sharedStyle,
    css`
      .big { display: grid; grid-template-columns: minmax(0, 1fr); gap: 10px; }
      .big > * { min-height: 64px; font-size: 1.12em; width: 100%; }
      input[type='file'] { padding: 14px 0; }
      .over { outline: 3px dashed var(--focus); }
      meter { width: 100%; height: 22px; }
    `,
  ];

  @state() private running = false;
  @state() private said = '';
  @state() private wrong = '';
  @state() private level = 0;
  private readonly recorder = new Recorder((why) => { this.said = why; void this.finish(); });
  private timer: ReturnType<typeof setInterval> | undefined;

  override disconnectedCallback(): void {
    super.disconnectedCallback();
    if (this.running) {
      void this.finish();
    }
  }

  private async begin(): Promise<void> {
    this.said = '';
    this.wrong = '';
    try {
      await this.recorder.start();
    } catch (error) {
      this.wrong = error instanceof Error ? error.message : String(error);
      await this.recorder.stop();
      return;
    }
    this.running = true;
    this.timer = setInterval(() => {
      this.level = Math.max(this.recorder.level, this.level * 0.8);
      this.recorder.level = 0;
      this.said = `${figure(this.recorder.seconds, 2)} s`;
    }, 100);
  }

  private async finish(): Promise<void> {
    clearInterval(this.timer);
    this.running = false;
    const take = await this.recorder.stop();
    if (!take) {
      this.wrong = 'The microphone gave no sound. Look whether it is muted, or open a recording.';
      return;
    }
    this.said = `${figure(take.seconds, 3)} s recorded: ${take.microphone}.`;
    const stamp = new Date().toISOString().slice(0, 19).replaceAll(':', '-');
    this.send({ wav: take.wav, name: `tap-${stamp}.wav`, microphone: take.microphone });
  }

  private async open(file: File | undefined): Promise<void> {
    this.wrong = '';
    if (!file) {
      return;
    }
    if (file.size > largestFile) {
      this.wrong = `The file ${file.name} has ${figure(file.size / 1e6, 3)} MB; up to ${largestFile / 1e6} MB are opened. Cut it to the taps first.`;
      return;
    }
    this.said = file.name;
    this.send({ wav: new Uint8Array(await file.arrayBuffer()), name: file.name, microphone: '' });
  }

  private send(detail: Recorded): void {
    this.dispatchEvent(new CustomEvent<Recorded>('recorded', { detail }));
  }

  private drop(event: DragEvent): void {
    event.preventDefault();
    void this.open(event.dataTransfer?.files[0]);
  }

  protected override render(): TemplateResult {
    const obstacle = microphoneObstacle();
    return html`<div class="big" @dragover=${(e: DragEvent) => e.preventDefault()} @drop=${this.drop}>
        ${obstacle ? html`<p class="note">${obstacle}</p>` : html`
          <button type="button" class="main large" id="record" @click=${() => void (this.running ? this.finish() : this.begin())}>
            ${this.running ? 'Stop' : 'Record taps'}</button>
          ${this.running ? html`<meter min="0" max="1" low="0.05" high="0.9" optimum="0.5" value=${this.level} aria-label="level of the microphone"></meter>` : nothing}`}
        <div><label for="file">Open a recording (WAV)</label>
        <input id="file" type="file" accept=".wav,audio/wav,audio/x-wav,audio/vnd.wave"
          @change=${(e: Event) => void this.open((e.target as HTMLInputElement).files?.[0])} /></div>
      </div>
      <p role="status">${this.said}</p>
      ${this.wrong ? html`<p class="error" role="alert">${this.wrong}</p>` : nothing}
      <p class="help">Tap with a fingertip or a soft eraser a third of the radius in from the rim, wait until it has rung out, tap again.
        Hold the microphone a hand's width from the sheet, near the rim. At most ${longestTake} s.</p>`;
  }
}
