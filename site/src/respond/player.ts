/** Plays frames: which one is on show, how much slower than life, forwards only. */
export class Player {
  /** Position in frames; its whole part is the frame on show. */
  position = 0;

  constructor(private count = 1, private duration = 1) {}

  load(count: number, duration: number): void {
    this.position = Math.min(this.position, count - 1);
    this.count = count;
    this.duration = duration;
  }

  get frame(): number {
    return Math.min(this.count - 1, Math.floor(this.position));
  }

  /** Moves on by `seconds` of the page's time, over a show that lasts `length` s, and starts again at the end. */
  advance(seconds: number, length: number): void {
    this.position = (this.position + (seconds * (this.count - 1)) / length) % this.count;
  }

  /** How many times slower than life a show of `length` s is. */
  slowness(length: number): number {
    return length / this.duration;
  }
}
