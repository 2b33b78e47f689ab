import { ClerkProvider } from '@clerk/nextjs';
import type { Metadata, Viewport } from 'next';
import { headers } from 'next/headers';
import type { ReactNode } from 'react';
import { ReadyMarker } from '@/components/ui/ready-marker';
import { readSignInSettings } from '@/lib/services/session/sign-in-settings';
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

export default async function RootLayout({ children }: { children: ReactNode }) {
  // Read first: it makes every page one of its request, which the policy's nonce and the settings below need.
  const nonce = (await headers()).get('x-nonce') ?? undefined;
  const { publishableKey, proxyPath } = readSignInSettings();
  return (
    <html lang="en" className={fontVariables} suppressHydrationWarning>
      <body>
        <ClerkProvider
          dynamic
          nonce={nonce}
          publishableKey={publishableKey}
          {...(proxyPath === null ? {} : { proxyUrl: proxyPath })}
          prefetchUI={false}
          telemetry={{ disabled: true }}
        >
          {children}
        </ClerkProvider>
        <ReadyMarker />
      </body>
    </html>
  );
}
