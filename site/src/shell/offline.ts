import { siteFile } from '../shipped.js';
import { SaveRequest } from './save-request.js';

/**
 * Keeps the site on the device: registers the service worker, says in the footer whether pages will open without a
 * network, and offers a new version when one waits. Nothing switches by itself: the reader decides, work is saved
 * first, then the waiting worker takes over and the page reloads.
 */
export async function startOffline(): Promise<void> {
  const script = siteFile('sw.js');
  if (script === null) {
    say('This file needs no network.');
    return;
  }
  if (window.top !== window) {
    say('Framed in another page: open the site itself to keep it for work without a network.');
    return;
  }
  if (!('serviceWorker' in navigator)) {
    say(isSecureContext
      ? 'This browser does not keep pages for work without a network. The single file does the same job.'
      : 'Served over plain http: browsers keep no pages for work without a network here. The single file does the same job.');
    return;
  }
  const container = navigator.serviceWorker;
  try {
    const registration = await container.register(script, { updateViaCache: 'none' });
    say(registration.active ? ready : 'Fetching the pages for work without a network...');
    follow(registration);
    registration.addEventListener('updatefound', () => follow(registration));
    addEventListener('visibilitychange', () => {
      if (document.visibilityState === 'visible') {
        registration.update().catch(() => undefined); // no network: ask again next time
      }
    });
  } catch (error) {
    say(`The pages could not be kept for work without a network: ${error instanceof Error ? error.message : String(error)}`);
  }
  // The first worker of all takes over a page that had none; that is no change of version.
  let controlled = container.controller !== null;
  container.addEventListener('controllerchange', () => {
    if (controlled && !reloading) {
      offer('Another tab has switched to the new version.', 'Reload this tab', saveAndReload);
    }
    controlled = true;
  });
}

const ready = 'Kept on this device: the pages open without a network.';
let reloading = false;

function follow(registration: ServiceWorkerRegistration): void {
  if (registration.waiting && registration.active) {
    offerUpdate(registration.waiting);
  }
  const arriving = registration.installing;
  arriving?.addEventListener('statechange', () => {
    if (arriving.state === 'installed' && registration.active && registration.active !== arriving) {
      offerUpdate(arriving);
    } else if (arriving.state === 'activated') {
      say(ready);
    } else if (arriving.state === 'redundant' && !registration.active) {
      say('The pages could not be kept for work without a network: not every file arrived. Reload to try again.');
    }
  });
}

function offerUpdate(waiting: ServiceWorker): void {
  offer('A new version is ready.', 'Save and reload to use it', async () => {
    await SaveRequest.send();
    reloading = true;
    navigator.serviceWorker.addEventListener('controllerchange', () => location.reload(), { once: true });
    waiting.postMessage('take-over');
  });
}

async function saveAndReload(): Promise<void> {
  await SaveRequest.send();
  location.reload();
}

/** Shows one line with one button under the bar. The page goes on working until the button is pressed. */
function offer(text: string, action: string, run: () => Promise<void>): void {
  const place = document.getElementById('updates') as HTMLElement;
  const words = document.createElement('span');
  words.textContent = text;
  const button = document.createElement('button');
  button.type = 'button';
  button.textContent = action;
  button.addEventListener('click', async () => {
    button.disabled = true;
    try {
      await run();
    } catch (error) {
      button.disabled = false;
      words.textContent = `Not reloaded, because your latest changes could not be saved: ${error instanceof Error ? error.message : String(error)}`;
    }
  });
  place.replaceChildren(words, button);
}

function say(text: string): void {
  const place = document.getElementById('offline-state');
  if (place) {
    place.textContent = text;
  }
}
