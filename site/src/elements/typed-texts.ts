/**
 * Typed texts of a page's own controls, read by the engine. The page keeps texts (they are what is remembered); the
 * values in SI units come from here.
 */
import type { ReadItem, ReadOut } from '../contract.js';
import { engine } from '../engine/client.js';

export class TypedTexts {
  private readings = new Map<string, ReadOut>();
  private asked = '';
  /** The reading of what was asked for last, which may be on its way. */
  private reading: Promise<boolean> = Promise.resolve(true);

  /** Reads all items. False when a newer reading is on its way. */
  read(items: readonly ReadItem[], key: string): Promise<boolean> {
    const asked = JSON.stringify(items);
    if (asked !== this.asked) {
      this.asked = asked;
      this.reading = this.fetch(items, key, asked);
    }
    return this.reading;
  }

  private async fetch(items: readonly ReadItem[], key: string, asked: string): Promise<boolean> {
    const answer = await engine.call('read', { items: [...items] }, { key, quick: true });
    if (asked !== this.asked) {
      return false;
    }
    if (answer.kind !== 'result') {
      this.asked = '';
      return false;
    }
    this.readings = new Map(answer.result.readings.map((r) => [r.field, r]));
    return true;
  }

  value(field: string): number {
    return this.readings.get(field)?.value ?? 0;
  }

  echo(field: string): string {
    return this.readings.get(field)?.echo ?? '';
  }

  problem(field: string): string {
    return this.readings.get(field)?.problem ?? '';
  }

  get sound(): boolean {
    return [...this.readings.values()].every((r) => r.problem === '');
  }
}
