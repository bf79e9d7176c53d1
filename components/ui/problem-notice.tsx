import { AppError } from '#shared/errors.ts';
import { Button } from './button.tsx';
import { Notice } from './notice.tsx';

type ProblemNoticeProps = {
  /** The error of the last try; nothing is drawn without one. */
  error: Error | null;
  /** What did not happen, as in `The kill sheet was not saved.` */
  title: string;
  /** For a record that somebody else has changed meanwhile: shows what it is now, instead of what stands in the form. */
  onShowNewest?: (() => void) | undefined;
};

/** Why a change was refused, what was kept, and what to do. */
export function ProblemNotice({ error, title, onShowNewest }: ProblemNoticeProps) {
  if (!error) return null;
  if (error instanceof AppError && error.code === 'STATE_CHANGED') {
    return (
      <Notice
        kind="held"
        spoken
        title={title}
        kept={error.message}
        next="Nothing was overwritten. What you entered is still here until you leave or show what it is now."
      >
        {onShowNewest ? <Button kind="quiet" small label="Show what it is now" onPress={onShowNewest} /> : null}
      </Notice>
    );
  }
  const fields = error instanceof AppError && error.fields ? Object.keys(error.fields).length : 0;
  return (
    <Notice
      kind="error"
      title={title}
      kept={error.message}
      next={fields > 0 ? 'What has to be put right stands beside the fields.' : undefined}
    />
  );
}
