/** Joins an element to the page's session: started with the first element, the element drawn anew at each change. */
import type { ReactiveController, ReactiveControllerHost } from 'lit';

import { session } from './session.js';

export class SessionController implements ReactiveController {
  private readonly changed = (): void => {
    this.onChange?.();
    this.host.requestUpdate();
  };

  /** `onChange` is called before each drawing, to ask for what depends on the document. */
  constructor(private readonly host: ReactiveControllerHost, private readonly onChange?: () => void) {
    host.addController(this);
  }

  hostConnected(): void {
    session.addEventListener('change', this.changed);
    void session.start().then(this.changed);
  }

  hostDisconnected(): void {
    session.removeEventListener('change', this.changed);
  }
}
