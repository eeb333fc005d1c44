/**
 * The frame of every page. It reads the chosen theme from a cookie, so the first bytes already carry
 * the right colours, and reading it makes each page render per request, as the nonce of proxy.ts needs.
 */
import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { fontVariables } from './_fonts/fonts';
import { asTheme, themeCookie } from './_components/theme';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Linewright', template: '%s · Linewright' },
  description: 'Transmission-line calculations over HTTP. Every number comes with its method, source, range and accuracy.',
  icons: { icon: '/mark.svg' },
};

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#FBF8F3' },
    { media: '(prefers-color-scheme: dark)', color: '#171412' },
  ],
};

export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  const theme = asTheme((await cookies()).get(themeCookie)?.value);
  return (
    <html lang="en" data-theme={theme === 'system' ? undefined : theme} className={fontVariables}>
      <body className="font-sans">{children}</body>
    </html>
  );
}
