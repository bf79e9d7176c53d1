import type { ReactNode } from 'react';

export type FieldWords = {
  label: string;
  hint?: string | undefined;
  /** What is wrong, in words; stands beside the field and is read with it. */
  error?: string | undefined;
  optional?: boolean | undefined;
  /** For a field in a table, whose column says it to those who see. */
  isLabelHidden?: boolean | undefined;
};

/** The ids that tie a control to its words: pass them on as `aria-describedby`. */
export function describedBy(id: string, { hint, error }: FieldWords): string | undefined {
  const ids = [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean);
  return ids.length > 0 ? ids.join(' ') : undefined;
}

/** Label, hint and error around a control. React Native has no label element, the page has. */
export function FieldFrame({ id, words, children }: { id: string; words: FieldWords; children: ReactNode }) {
  return (
    <div className="w-field">
      <label className={words.isLabelHidden ? 'w-hidden' : 'w-label'} htmlFor={id}>
        {words.label}
        {words.optional ? <span className="w-optional"> (if you like)</span> : null}
      </label>
      {words.hint ? (
        <div className="w-hint" id={`${id}-hint`}>
          {words.hint}
        </div>
      ) : null}
      {children}
      <FieldError id={`${id}-error`} error={words.error} />
    </div>
  );
}

export function FieldError({ id, error }: { id: string; error: string | undefined }) {
  return error ? (
    <div className="w-error" id={id} role="alert">
      {error}
    </div>
  ) : null;
}
