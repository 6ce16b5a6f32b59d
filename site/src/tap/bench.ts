/** What the page Tap remembers for a diaphragm: the peaks with what the person decided about each. */
import type { FoundPeak, Peak, TapSession } from '../contract.js';

export interface BenchPeak extends Peak {
  ringDown: number;
  kind: FoundPeak['kind'] | 'typed' | 'kept';
}

export interface Bench {
  peaks: BenchPeak[];
  /** When they were taken, RFC 3339. */
  tapped: string;
  /** Id of the kept session they belong to; empty for none. */
  session: string;
  recordingName: string;
  microphone: string;
  by: string;
  instrument: string;
  notes: string;
  /** As typed. */
  airTemperature: string;
  sheetTemperature: string;
}

export function emptyBench(): Bench {
  return {
    peaks: [], tapped: '', session: '', recordingName: '', microphone: '', by: '', instrument: '', notes: '',
    airTemperature: '', sheetTemperature: '',
  };
}

/** Found peaks as they are first offered: steady tones are set aside. */
export function offered(found: readonly FoundPeak[]): BenchPeak[] {
  return found.map((p) => ({
    frequency: p.frequency, uncertainty: p.uncertainty, level: p.level, use: p.kind !== 'steady', m: 0, n: 0, ringDown: p.ringDown, kind: p.kind,
  }));
}

/** The peaks of a kept session. */
export function keptPeaks(session: TapSession): BenchPeak[] {
  return session.peaks.map((p) => ({
    frequency: p.frequency, uncertainty: p.uncertainty, level: 0, use: true, m: p.m, n: p.n, ringDown: 0, kind: 'kept',
  }));
}

/** A peak as the engine takes it. */
export function asPeak(p: BenchPeak): Peak {
  return { frequency: p.frequency, uncertainty: p.uncertainty, level: p.level, use: p.use, m: p.m, n: p.n };
}
