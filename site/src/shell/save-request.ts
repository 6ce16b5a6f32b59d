/**
 * Asks whoever holds unsaved work to write it now, before this page reloads into a new version. Dispatched on window;
 * a listener calls `waitUntil` with the promise of its save.
 */
export class SaveRequest extends Event {
  static readonly type = 'hoopsheet-save';
  private readonly waits: Promise<unknown>[] = [];

  constructor() {
    super(SaveRequest.type);
  }

  waitUntil(save: Promise<unknown>): void {
    this.waits.push(save);
  }

  /** Resolves when every save has; rejects when one fails. */
  static async send(): Promise<void> {
    const request = new SaveRequest();
    dispatchEvent(request);
    await Promise.all(request.waits);
  }
}
