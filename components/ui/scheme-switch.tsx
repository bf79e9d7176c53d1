import { useTheme, type SchemeChoice } from '#components/theme/use-theme.ts';
import { ChipGroup } from './chip-group.tsx';

const choices = [
  { value: 'device', label: 'As device' },
  { value: 'light', label: 'Light' },
  { value: 'dark', label: 'Dark' },
] as const satisfies { value: SchemeChoice; label: string }[];

/** Dark suits the cold room and tired eyes; the browser remembers it. */
export function SchemeSwitch() {
  const { choice, choose } = useTheme();
  return (
    <ChipGroup
      label="Light or dark"
      value={choice}
      chips={choices}
      onChange={(value) => {
        const chosen = choices.find((one) => one.value === value);
        if (chosen) choose(chosen.value);
      }}
    />
  );
}
