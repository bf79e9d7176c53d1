import type { ReactNode } from 'react';
import { Button } from '#components/ui/button.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';

type ChangeSheetProps = {
  open: boolean;
  title: string;
  onClose: () => void;
  /** What doing it is called, as in `Move it there`. */
  doLabel: string;
  busyLabel: string;
  isBusy: boolean;
  isReady: boolean;
  onDo: () => void;
  /** The farm's refusal, such as a time that has filled up meanwhile. */
  refusal: string | undefined;
  children: ReactNode;
};

/** One change of a paid order: the choice, why it was refused, and the button that does it. */
export function ChangeSheet(props: ChangeSheetProps) {
  const { open, title, onClose, doLabel, busyLabel, isBusy, isReady, onDo, refusal, children } = props;
  return (
    <Sheet
      open={open}
      onClose={onClose}
      title={title}
      actions={
        <>
          <Button label={doLabel} busy={isBusy} busyLabel={busyLabel} disabled={!isReady} onPress={onDo} />
          <Button kind="quiet" label="Keep it as it is" onPress={onClose} />
        </>
      }
    >
      {children}
      {refusal ? <Notice kind="error" title={refusal} /> : null}
    </Sheet>
  );
}
