import { applyTheme, asTheme, storedTheme, storeTheme } from './theme-store.js';

/** The window's event after a change of theme. Drawings on a canvas redraw on it. */
export const themeChanged = 'hoopsheet-theme';

/** Makes the choice in the footer work, in every open tab. */
export function startThemeChoice(): void {
  const choice = document.getElementById('theme') as HTMLSelectElement;
  const show = () => {
    choice.value = storedTheme();
    applyTheme(storedTheme());
    dispatchEvent(new Event(themeChanged));
  };
  choice.value = storedTheme();
  choice.addEventListener('change', () => {
    const theme = asTheme(choice.value);
    storeTheme(theme);
    applyTheme(theme);
    dispatchEvent(new Event(themeChanged));
  });
  addEventListener('storage', (event) => {
    if (event.key === 'hoopsheet-theme' || event.key === null) {
      show();
    }
  });
  for (const query of ['(prefers-color-scheme: dark)', '(prefers-contrast: more)']) {
    matchMedia(query).addEventListener('change', () => dispatchEvent(new Event(themeChanged)));
  }
}
