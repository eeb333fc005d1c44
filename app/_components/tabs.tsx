'use client';

import { useId, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';

interface Tab {
  readonly id: string;
  readonly title: ReactNode;
  readonly content: ReactNode;
}

interface TabsProps {
  readonly label: string;
  readonly tabs: readonly Tab[];
  /** Given together to keep the choice outside; else the tabs keep it themselves. */
  readonly selected?: string;
  readonly onSelect?: (id: string) => void;
  readonly className?: string;
}

/** Arrow keys, Home and End move the choice; Tab leaves for the content. */
export function Tabs({ label, tabs, selected, onSelect, className = '' }: TabsProps) {
  const [own, setOwn] = useState(tabs[0]?.id);
  const id = useId();
  const list = useRef<HTMLDivElement>(null);
  const current = tabs.find((tab) => tab.id === (selected ?? own)) ?? tabs[0];

  function select(tab: Tab) {
    setOwn(tab.id);
    onSelect?.(tab.id);
  }

  function onKeyDown(event: KeyboardEvent) {
    const at = tabs.indexOf(current);
    const to = { ArrowRight: at + 1, ArrowLeft: at - 1, Home: 0, End: tabs.length - 1 }[event.key];
    if (to === undefined) return;
    event.preventDefault();
    const index = (to + tabs.length) % tabs.length;
    select(tabs[index]);
    list.current?.querySelectorAll<HTMLElement>('[role=tab]')[index]?.focus();
  }

  if (!current) return null;
  return (
    <div className={className}>
      <div ref={list} role="tablist" aria-label={label} onKeyDown={onKeyDown} className="flex gap-[18px] overflow-x-auto text-small">
        {tabs.map((tab) => (
          <button
            key={tab.id}
            type="button"
            role="tab"
            id={`${id}-${tab.id}`}
            aria-selected={tab === current}
            aria-controls={`${id}-panel`}
            tabIndex={tab === current ? 0 : -1}
            onClick={() => select(tab)}
            className={`relative flex-none pb-2.5 whitespace-nowrap -outline-offset-2 ${tab === current ? 'font-[550] text-ink' : 'text-ash hover:text-ink'}`}
          >
            {tab.title}
            {tab === current && <span aria-hidden className="pair absolute inset-x-0 bottom-0 text-copper" />}
          </button>
        ))}
      </div>
      <div role="tabpanel" id={`${id}-panel`} aria-labelledby={`${id}-${current.id}`} className="mt-2.5">
        {current.content}
      </div>
    </div>
  );
}
