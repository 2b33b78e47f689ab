import type { Metadata, Viewport } from 'next';
import type { ReactNode } from 'react';
import { ReadyMarker } from '@/components/ui/ready-marker';
import { fontVariables } from './fonts';
import './globals.css';

export const metadata: Metadata = { title: { default: 'Stilewright', template: '%s · Stilewright' } };

export const viewport: Viewport = {
  width: 'device-width',
  initialScale: 1,
  themeColor: [
    { media: '(prefers-color-scheme: light)', color: '#e6e9e3' },
    { media: '(prefers-color-scheme: dark)', color: '#161b19' },
  ],
};

export default function RootLayout({ children }: { children: ReactNode }) {
  return (
    <html lang="en" className={fontVariables} suppressHydrationWarning>
      <body>
        {children}
        <ReadyMarker />
      </body>
    </html>
  );
}
