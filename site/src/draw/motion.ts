/** A slow phase for animations: runs while visible, stops for good where the device asks for reduced motion. */
import type { ReactiveController, ReactiveControllerHost } from 'lit';

const reduced = matchMedia('(prefers-reduced-motion: reduce)');

export class Motion implements ReactiveController {
  /** Seconds run so far. */
  seconds = 0;
  private frame = 0;
  private last = 0;
  private wanted: boolean;

  constructor(private readonly host: ReactiveControllerHost & Element, private readonly tick: () => void) {
    this.wanted = !reduced.matches;
    host.addController(this);
  }

  get running(): boolean {
    return this.wanted;
  }

  hostConnected(): void {
    this.go();
    document.addEventListener('visibilitychange', this.go);
  }

  hostDisconnected(): void {
    cancelAnimationFrame(this.frame);
    this.frame = 0;
    document.removeEventListener('visibilitychange', this.go);
  }

  toggle(on = !this.wanted): void {
    this.wanted = on;
    this.go();
    this.host.requestUpdate();
  }

  private readonly go = (): void => {
    cancelAnimationFrame(this.frame);
    this.frame = 0;
    if (this.wanted && document.visibilityState === 'visible') {
      this.last = performance.now();
      this.frame = requestAnimationFrame(this.step);
    }
  };

  private readonly step = (now: number): void => {
    this.seconds += Math.min(0.1, (now - this.last) / 1000);
    this.last = now;
    this.tick();
    this.frame = requestAnimationFrame(this.step);
  };
}
