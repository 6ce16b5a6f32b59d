/**
 * What the tabs of this browser tell each other: who has which diaphragm open, and who has just saved it.
 * BroadcastChannel is there on plain http too; where it is missing the stamps of the store still refuse an overwrite.
 */
export interface TabNews {
  readonly kind: 'opened' | 'here' | 'closed' | 'saved';
  readonly id: string;
  readonly tab: string;
}

export class Tabs {
  readonly tab = String(crypto.getRandomValues(new Uint32Array(1))[0]);
  private readonly channel = 'BroadcastChannel' in globalThis ? new BroadcastChannel('hoopsheet') : null;
  private readonly others = new Set<string>();
  private id = '';

  constructor(private readonly changed: (news: TabNews) => void) {
    this.channel?.addEventListener('message', (event: MessageEvent<TabNews>) => this.hear(event.data));
    addEventListener('pagehide', () => this.tell('closed'));
    addEventListener('pageshow', (event) => {
      if (event.persisted) {
        this.tell('opened');
      }
    });
  }

  /** Whether another tab has the same diaphragm open. */
  get shared(): boolean {
    return this.others.size > 0;
  }

  /** Announces that this tab now works on the diaphragm. */
  open(id: string): void {
    if (id === this.id) {
      return;
    }
    if (this.id !== '') {
      this.tell('closed');
    }
    this.id = id;
    this.others.clear();
    this.tell('opened');
  }

  saved(): void {
    this.tell('saved');
  }

  private tell(kind: TabNews['kind']): void {
    if (this.id !== '') {
      this.channel?.postMessage({ kind, id: this.id, tab: this.tab } satisfies TabNews);
    }
  }

  private hear(news: TabNews): void {
    if (news.id !== this.id) {
      return;
    }
    if (news.kind === 'closed') {
      this.others.delete(news.tab);
    } else {
      this.others.add(news.tab);
    }
    if (news.kind === 'opened') {
      this.tell('here');
    }
    this.changed(news);
  }
}
