import 'react-native';

/* eslint-disable @typescript-eslint/consistent-type-definitions -- a library's types can only be added to as interfaces */
declare module 'react-native' {
  /** React Native Web hands these on to the page; React Native's own types leave them out. */
  interface AccessibilityProps {
    'aria-atomic'?: boolean | undefined;
    'aria-controls'?: string | undefined;
    'aria-current'?: 'page' | 'step' | 'date' | boolean | undefined;
    'aria-describedby'?: string | undefined;
    'aria-haspopup'?: 'dialog' | 'menu' | undefined;
    'aria-invalid'?: boolean | undefined;
    'aria-level'?: number | undefined;
    'aria-pressed'?: boolean | undefined;
    'aria-required'?: boolean | undefined;
  }

  interface PressableProps {
    onKeyDown?: ((event: { key: string; preventDefault: () => void }) => void) | undefined;
  }
}
