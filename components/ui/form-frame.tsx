import type { ReactNode } from 'react';

type FormFrameProps = {
  /** Names the form for those who listen. */
  name: string;
  onSubmit: () => void;
  children: ReactNode;
};

/** Fields and their button. Enter in a one-line field sends, as people expect of a form. */
export function FormFrame({ name, onSubmit, children }: FormFrameProps) {
  return (
    <form
      className="w-stack"
      aria-label={name}
      noValidate
      onSubmit={(event) => event.preventDefault()}
      onKeyDownCapture={(event) => {
        const target = event.target;
        const isLine = target instanceof HTMLInputElement && !['checkbox', 'radio', 'date'].includes(target.type);
        if (event.key === 'Enter' && isLine && !event.nativeEvent.isComposing) onSubmit();
      }}
    >
      {children}
    </form>
  );
}
