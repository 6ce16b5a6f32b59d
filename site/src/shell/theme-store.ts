/** The theme chosen by hand; '' follows the device. Storage may be refused, then the choice lasts as long as the page. */
export type Theme = '' | 'light' | 'dark' | 'sunlight';

const key = 'hoopsheet-theme';
const themes: readonly string[] = ['light', 'dark', 'sunlight'];

export function storedTheme(): Theme {
  try {
    return asTheme(localStorage.getItem(key));
  } catch {
    return '';
  }
}

export function storeTheme(theme: Theme): void {
  try {
    if (theme === '') {
      localStorage.removeItem(key);
    } else {
      localStorage.setItem(key, theme);
    }
  } catch {
    // Refused: the choice still holds on this page.
  }
}

export function applyTheme(theme: Theme): void {
  if (theme === '') {
    delete document.documentElement.dataset.theme;
  } else {
    document.documentElement.dataset.theme = theme;
  }
}

export function asTheme(value: string | null): Theme {
  return value !== null && themes.includes(value) ? (value as Theme) : '';
}
