/** The cookie that keeps a person's theme. The server reads it, so that the first paint is already right. */
export const THEME_COOKIE = 'tareline-theme';
export type ThemeChoice = 'light' | 'dark';

export const parseThemeChoice = (value: string | undefined): ThemeChoice | undefined =>
  value === 'light' || value === 'dark' ? value : undefined;
