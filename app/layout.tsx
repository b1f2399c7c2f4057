import type { Metadata, Viewport } from 'next';
import type { ReactNode } from 'react';
import { currentTheme } from '@/components/shell/read-theme';
import { StatusProvider } from '@/components/ui/status';
import { fontVariables } from './fonts';
import './globals.css';

// Every page carries a fresh script nonce, so none may be rendered ahead of its request.
export const dynamic = 'force-dynamic';

export const metadata: Metadata = {
  title: { default: 'Selvedge', template: '%s · Selvedge' },
  description:
    'Works out what will wrap around in an MR picture of a given patient, and ranks the cheapest ways to keep it out of the part that matters.',
  robots: { index: false, follow: false },
};

export const viewport: Viewport = { width: 'device-width', initialScale: 1, colorScheme: 'light dark' };

export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = await currentTheme();
  return (
    <html lang="en-GB" className={fontVariables} data-theme={theme === 'system' ? undefined : theme}>
      <body className="bg-cloth text-ink antialiased">
        <StatusProvider>{children}</StatusProvider>
      </body>
    </html>
  );
}
