import { useEffect, useId, useRef, type ReactNode } from 'react';
import { Button } from './Button.tsx';

interface DialogProps {
  open: boolean;
  /** Called by Escape, by the close button and by leaving in any other way. */
  onClose: () => void;
  title: string;
  children: ReactNode;
  /** Buttons at the foot; the one that does it comes last. */
  actions?: ReactNode;
  wide?: boolean;
}

/** The browser's own modal dialog: focus is kept inside and goes back on closing, Escape leaves. */
export function Dialog({ open, onClose, title, children, actions, wide = false }: DialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const titleId = useId();
  useEffect(() => {
    const element = dialog.current;
    if (!element) return;
    if (open && !element.open) element.showModal();
    if (!open && element.open) element.close();
  }, [open]);
  return (
    <dialog
      ref={dialog}
      className="dialog"
      data-wide={wide ? '' : undefined}
      aria-labelledby={titleId}
      onClose={() => open && onClose()}
    >
      {open && (
        <>
          <h2 className="dialog-title" id={titleId}>
            {title}
          </h2>
          <div className="dialog-body">{children}</div>
          {actions && <div className="dialog-acts">{actions}</div>}
        </>
      )}
    </dialog>
  );
}

interface ConfirmProps {
  open: boolean;
  onClose: () => void;
  onConfirm: () => void;
  /** A question that names verb and object: "Remove Tern Head?" */
  title: string;
  /** The verb and the object again: "Remove Tern Head". */
  confirm: string;
  /** What is lost and what stays. */
  children: ReactNode;
  destructive?: boolean;
  busy?: boolean;
}

/** Asked before something is frozen, sent, removed or lost; for nothing else. */
export function ConfirmDialog({ open, onClose, onConfirm, title, confirm, children, ...rest }: ConfirmProps) {
  return (
    <Dialog
      open={open}
      onClose={onClose}
      title={title}
      actions={
        <>
          <Button kind="text" onClick={onClose}>
            Not now
          </Button>
          <Button
            kind={rest.destructive ? 'destructive' : 'primary'}
            icon={rest.destructive ? 'remove' : undefined}
            busy={rest.busy}
            onClick={onConfirm}
          >
            {confirm}
          </Button>
        </>
      }
    >
      {children}
    </Dialog>
  );
}
