import type { ReactNode } from 'react';
import { CodeBlock } from './code-block';

interface EmptyStateProps {
  readonly title: string;
  /** What to do next. */
  readonly children: ReactNode;
  /** A command that works as it stands. */
  readonly command?: string;
  readonly actions?: ReactNode;
}

export function EmptyState({ title, children, command, actions }: EmptyStateProps) {
  return (
    <div className="max-w-[44rem] border-t border-rule pt-5">
      <h2 className="text-heading font-semibold">{title}</h2>
      <div className="mt-1 max-w-measure text-ash">{children}</div>
      {command && <CodeBlock code={command} label="command" className="mt-4" />}
      {actions && <div className="mt-4 flex flex-wrap gap-3">{actions}</div>}
    </div>
  );
}
