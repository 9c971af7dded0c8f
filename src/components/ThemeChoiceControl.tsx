/** The choice between the system's theme, light and dark. */
import { chooseTheme, THEME_CHOICES, useTheme } from '../theme/theme.ts';
import { Segmented } from './Segmented.tsx';

export function ThemeChoiceControl() {
  const { choice } = useTheme();
  return (
    <Segmented
      label="Theme"
      options={THEME_CHOICES.map((value) => ({ value, label: value }))}
      value={choice}
      onChange={chooseTheme}
    />
  );
}
