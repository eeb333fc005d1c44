'use client';

import { CopyButton } from './copy-button';

interface CodeBlockProps {
  readonly code: string;
  /** What it is, for assistive technology: "curl command", "request body". */
  readonly label: string;
  /** Breaks long lines instead of scrolling sideways. */
  readonly wrap?: boolean;
  /** A longest height with its own scroll bar, for large documents. */
  readonly tall?: boolean;
  readonly className?: string;
}

export function CodeBlock({ code, label, wrap = false, tall = false, className = '' }: CodeBlockProps) {
  return (
    <div className={`relative rounded-field bg-wash ${className}`}>
      <pre
        tabIndex={0}
        role="region"
        aria-label={label}
        className={`overflow-auto px-4 py-3.5 pr-20 font-mono text-[12.5px] leading-[1.6] ${wrap ? 'wrap-anywhere whitespace-pre-wrap' : ''} ${tall ? 'max-h-[32rem]' : ''}`}
      >
        {code}
      </pre>
      {/* A patch of the ground behind it: long lines pass beneath the button, not through it. */}
      <div className="absolute top-0 right-0 rounded-field bg-wash pt-2.5 pr-3 pb-1 pl-2">
        <CopyButton text={code} of={label} />
      </div>
    </div>
  );
}
