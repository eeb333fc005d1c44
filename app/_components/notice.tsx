import type { ReactNode } from 'react';

type Tone = 'warning' | 'error' | 'success';

const tones: Record<Tone, { readonly bar: string; readonly title: string; readonly role?: 'alert' | 'status' }> = {
  warning: { bar: 'border-ochre', title: 'text-ochre' },
  error: { bar: 'border-garnet', title: 'text-garnet', role: 'alert' },
  success: { bar: 'border-patina', title: 'text-patina', role: 'status' },
};

interface NoticeProps {
  readonly tone?: Tone;
  /** A few words; the sentence follows. */
  readonly title?: ReactNode;
  readonly children?: ReactNode;
  readonly className?: string;
}

export function Notice({ tone = 'warning', title, children, className = '' }: NoticeProps) {
  const { bar, title: titleColour, role } = tones[tone];
  return (
    <div role={role} className={`border-l-[3px] py-0.5 pl-3 text-small wrap-anywhere ${bar} ${className}`}>
      {title && <b className={`font-semibold ${titleColour}`}>{title} </b>}
      {children}
    </div>
  );
}
