/**
 * Records from the microphone with the browser's processing asked to be off: it ruins spectra and decays. What the
 * browser really applied is reported and kept with the tap, since a browser may do otherwise without a word.
 */
import { scriptURL, single } from '../shipped.js';
import { wavFile } from './wav-file.js';

/** Longest take, s. */
export const longestTake = 30;

export interface Take {
  readonly wav: Uint8Array;
  readonly seconds: number;
  /** What the browser applied, and what may be missing, in words. */
  readonly microphone: string;
}

/** Why this page cannot use the microphone; empty where it may try. */
export function microphoneObstacle(): string {
  if (!isSecureContext || !('mediaDevices' in navigator)) {
    return 'This page came over plain http (or from a browser that forbids it), so the browser gives it no microphone. '
      + 'Record with the device\'s own recorder as WAV and open the file here, or open this page over https or from the single file.';
  }
  return '';
}

export class Recorder {
  /** Largest sample since the last look, 0 to 1, for the level meter. */
  level = 0;
  private stream: MediaStream | null = null;
  private context: AudioContext | null = null;
  private blocks: Float32Array[] = [];
  private count = 0;
  private byScript = false;

  /** `ended` is called when the take ends by itself: the longest time is reached, or the microphone is gone. */
  constructor(private readonly ended: (why: string) => void) {}

  get seconds(): number {
    return this.context ? this.count / this.context.sampleRate : 0;
  }

  /** Starts a take. Rejects with a sentence. */
  async start(): Promise<void> {
    try {
      this.stream = await navigator.mediaDevices.getUserMedia({
        audio: { echoCancellation: false, noiseSuppression: false, autoGainControl: false },
      });
    } catch (error) {
      throw new Error(refusalWords(error));
    }
    // The context takes the device's own rate: to force another one fails in some browsers.
    const context = new AudioContext();
    this.context = context;
    const source = context.createMediaStreamSource(this.stream);
    this.stream.getAudioTracks()[0]?.addEventListener('ended', () => this.ended('The microphone was unplugged or taken away; what was recorded until then is used.'));
    if (!single && 'audioWorklet' in context) {
      await context.audioWorklet.addModule(scriptURL('capture'));
      const node = new AudioWorkletNode(context, 'hoopsheet-capture', { numberOfOutputs: 0 });
      node.port.onmessage = (event: MessageEvent<Float32Array>) => this.take(event.data);
      source.connect(node);
    } else {
      this.startScript(context, source);
    }
    await context.resume();
  }

  /** The old way, where a worklet cannot be loaded. It can lose blocks when the page is busy. */
  private startScript(context: AudioContext, source: MediaStreamAudioSourceNode): void {
    this.byScript = true;
    const node = context.createScriptProcessor(4096, 1, 1);
    node.onaudioprocess = (event) => this.take(event.inputBuffer.getChannelData(0).slice());
    source.connect(node);
    node.connect(context.destination);
  }

  private take(block: Float32Array): void {
    if (!this.context) {
      return;
    }
    this.blocks.push(block);
    this.count += block.length;
    for (const v of block) {
      this.level = Math.max(this.level, Math.abs(v));
    }
    if (this.seconds >= longestTake) {
      this.ended(`The take was ended after ${longestTake} s.`);
    }
  }

  /** Ends the take and gives it as a file; null where nothing was recorded. */
  async stop(): Promise<Take | null> {
    const { stream, context, blocks, seconds } = this;
    const microphone = stream ? applied(stream, this.byScript) : '';
    stream?.getTracks().forEach((track) => track.stop());
    this.stream = null;
    this.context = null;
    this.blocks = [];
    this.count = 0;
    const rate = context?.sampleRate ?? 0;
    await context?.close();
    return blocks.length === 0 ? null : { wav: wavFile(blocks, rate), seconds, microphone };
  }
}

/** A setting that the browser leaves out is unknown, not off. */
function applied(stream: MediaStream, byScript: boolean): string {
  const settings = stream.getAudioTracks()[0]?.getSettings() ?? {};
  const word = (value: unknown): string => (value === undefined ? 'not stated' : value === false ? 'off' : 'ON');
  return `echo cancellation ${word(settings.echoCancellation)}, noise suppression ${word(settings.noiseSuppression)}, `
    + `automatic gain ${word(settings.autoGainControl)}`
    + (byScript ? '; captured in the page itself, which may have lost blocks while it was busy' : '');
}

function refusalWords(error: unknown): string {
  switch (error instanceof DOMException ? error.name : '') {
    case 'NotAllowedError':
      return 'The browser was told not to let this page use the microphone. Allow it in the browser\'s settings for this page, or open a recording.';
    case 'NotFoundError':
      return 'This device has no microphone that the browser can find. Plug one in, or open a recording.';
    case 'NotReadableError':
      return 'Another program is using the microphone. Close it, or open a recording.';
    default:
      return 'The microphone could not be started. Open a recording instead.';
  }
}
