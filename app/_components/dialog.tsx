'use client';

import { useEffect, useId, useRef, type ReactNode } from 'react';

interface DialogProps {
  readonly title: ReactNode;
  readonly onClose: () => void;
  /** False while closing would lose something that cannot be had again: Escape and the backdrop do nothing. */
  readonly dismissible?: boolean;
  readonly wide?: boolean;
  readonly children: ReactNode;
}

/**
 * Open as long as it is rendered. The browser's own modal dialog keeps the focus inside and the page
 * behind inert; the focus returns to where it was when it closes.
 */
export function Dialog({ title, onClose, dismissible = true, wide = false, children }: DialogProps) {
  const dialog = useRef<HTMLDialogElement>(null);
  const titleId = useId();

  useEffect(() => {
    const element = dialog.current;
    const opener = document.activeElement;
    element?.showModal();
    // The framework's autoFocus comes before the dialog is open, when nothing in it can have the focus.
    element?.querySelector<HTMLElement>('[data-first-focus]')?.focus();
    return () => {
      element?.close();
      if (opener instanceof HTMLElement) opener.focus();
    };
  }, []);

  return (
    <dialog
      ref={dialog}
      aria-labelledby={titleId}
      onCancel={(event) => {
        event.preventDefault();
        if (dismissible) onClose();
      }}
      // Chromium closes on a second Escape whatever `cancel` says; a dialog that must stay swallows the key.
      onKeyDown={(event) => {
        if (event.key === 'Escape' && !dismissible) event.preventDefault();
      }}
      onMouseDown={(event) => {
        if (dismissible && event.target === dialog.current) onClose();
      }}
      className={`m-auto max-h-[calc(100dvh-2rem)] w-[calc(100vw-2rem)] overflow-auto rounded-field border border-rule bg-paper text-ink shadow-[0_12px_48px_rgb(0_0_0/0.18)] ${wide ? 'max-w-[44rem]' : 'max-w-[30rem]'}`}
    >
      <div className="px-5 pt-5 pb-6 sm:px-7">
        <div className="flex items-start justify-between gap-6">
          <h2 id={titleId} className="text-[20px] leading-tight font-semibold tracking-[-0.01em] wrap-anywhere">
            {title}
          </h2>
          {dismissible && (
            <button type="button" onClick={onClose} className="flex-none text-small text-ash hover:text-ink">
              Close
            </button>
          )}
        </div>
        <div aria-hidden className="pair mt-3 mb-5 text-rule" />
        {children}
      </div>
    </dialog>
  );
}
