import type { TextStyle, ViewStyle } from 'react-native';

/**
 * Names of rules in the global sheet, as a style. React Native Web passes an object marked `$$css` on as class names;
 * its types do not know that, hence the one cast. Server and browser write the same class, so media queries decide the
 * layout before any script runs.
 */
export function css(...names: (string | false | undefined)[]): ViewStyle & TextStyle {
  const list = names.filter(Boolean).join(' ');
  return { $$css: true, [list]: list } as unknown as ViewStyle & TextStyle;
}
