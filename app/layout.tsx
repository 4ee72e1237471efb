import type { Metadata, Viewport } from 'next';
import { cookies } from 'next/headers';
import type { ReactNode } from 'react';
import { Announcements } from '@/components/ui';
import { fontVariables } from './fonts';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Understave', template: '%s · Understave' },
  description: 'Write, discuss, print, assign and mark harmonic analyses of real scores.',
  robots: { index: false, follow: false },
};

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#faf6ea' },
    { media: '(prefers-color-scheme: dark)', color: '#171511' },
  ],
};

/** The theme comes from a cookie, so that the first byte wears it; absent, the device decides (app/globals.css). */
export default async function RootLayout({ children }: { readonly children: ReactNode }) {
  const chosen = (await cookies()).get('theme')?.value;
  const theme = chosen === 'day' || chosen === 'night' ? chosen : undefined;
  return (
    <html lang="en" className={fontVariables} data-theme={theme}>
      <body>
        <Announcements>{children}</Announcements>
      </body>
    </html>
  );
}
