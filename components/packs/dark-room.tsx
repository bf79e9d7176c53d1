import { useTheme } from '#components/theme/use-theme.ts';
import { Button } from '#components/ui/button.tsx';

/** A bright screen blinds in a cold room; one press there and back. */
export function DarkRoom() {
  const { choice, choose } = useTheme();
  const isDark = choice === 'dark';
  return (
    <Button
      kind="quiet"
      label={isDark ? 'Light screen' : 'Dark screen'}
      pressed={isDark}
      onPress={() => choose(isDark ? 'device' : 'dark')}
    />
  );
}
