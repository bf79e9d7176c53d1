import { useEffect, useId, useRef, type ReactNode } from 'react';
import { IconButton } from './icon-button.tsx';

type SheetProps = {
  open: boolean;
  onClose: () => void;
  title: string;
  children: ReactNode;
  /** Buttons at the foot, the main one first. */
  actions?: ReactNode;
};

/**
 * A sheet from below on a phone, a window in the middle of a wide screen. The page's own dialog element keeps the
 * keyboard inside, closes on Escape and gives the focus back to where it was.
 */
export function Sheet({ open, onClose, title, children, actions }: SheetProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const id = useId();
  useEffect(() => {
    const element = dialog.current;
    if (open && element && !element.open) element.showModal();
    if (!open && element?.open) element.close();
  }, [open]);
  return (
    <dialog
      ref={dialog}
      className="w-sheet"
      aria-labelledby={id}
      onClose={() => {
        if (open) onClose();
      }}
      onClick={(event) => {
        // The click lands on the dialog itself only beside its content, on the veil.
        if (event.target === event.currentTarget) onClose();
      }}
    >
      <div className="w-sheet-inner">
        <div className="w-sheet-head">
          <h2 className="t-section" id={id}>
            {title}
          </h2>
          <IconButton icon="close" name="Close" onPress={onClose} />
        </div>
        {open ? <div className="w-sheet-body">{children}</div> : null}
        {open && actions ? <div className="w-sheet-foot w-buttons">{actions}</div> : null}
      </div>
    </dialog>
  );
}
