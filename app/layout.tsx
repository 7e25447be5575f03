import type { Metadata, Viewport } from 'next';
import type { ReactNode } from 'react';
import './globals.css';

export const metadata: Metadata = {
  title: { default: 'Hilum', template: '%s · Hilum' },
  description: 'The right soybean variety on the right field, with its reasons, before seed is booked.',
  icons: { icon: '/hilum.svg' },
};

export const viewport: Viewport = { width: 'device-width', initialScale: 1, themeColor: '#1a1613' };

export default function RootLayout({ children }: { children: ReactNode }) {
  return (
    <html lang="en">
      <body>{children}</body>
    </html>
  );
}
