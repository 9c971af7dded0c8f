/** Turns the theme over; for pages without a person's menu. */
import { chooseTheme, useTheme } from '../theme/theme.ts';

export function ThemeButton() {
  const { theme } = useTheme();
  const other = theme === 'dark' ? 'light' : 'dark';
  return (
    <button
      type="button"
      onClick={() => chooseTheme(other)}
      aria-label={`Show it ${other}`}
      className="text-ink-2 hover:text-ink min-h-28"
    >
      {other}
    </button>
  );
}
