/** The three ways a person may want the colours; `system` follows the device. */
export const themes = ['system', 'light', 'dark'] as const;
export type Theme = (typeof themes)[number];

export const themeCookie = 'linewright-theme';

export function asTheme(text: string | undefined): Theme {
  return themes.find((theme) => theme === text) ?? 'system';
}
