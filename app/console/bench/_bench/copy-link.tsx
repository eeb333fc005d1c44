'use client';

import { useEffect, useState } from 'react';
import { CopyButton } from '@/app/_components/copy-button';
import { encodeInput } from '../_link/input-in-link';

/** A colleague who opens the link has the same input before them; they run it under their own name. */
export function CopyLink({ input }: { readonly input: unknown }) {
  const [link, setLink] = useState('');

  useEffect(() => {
    let stale = false;
    void encodeInput(input).then((text) => {
      const { origin, pathname } = window.location;
      if (!stale) setLink(`${origin}${pathname}#${text}`);
    });
    return () => {
      stale = true;
    };
  }, [input]);

  return (
    <p className="flex items-center gap-3 text-fine text-ash">
      <CopyButton text={link} of="link" />
      Link that reopens this input for a colleague.
    </p>
  );
}
