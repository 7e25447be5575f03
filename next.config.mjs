const development = process.env.NODE_ENV !== 'production';
// A tile layer is the only thing ever fetched from elsewhere, and only when one is configured at build time.
const tiles = process.env.HILUM_TILE_URL ? new URL(process.env.HILUM_TILE_URL.replace(/[{}]/g, '')).origin : '';
const contentSecurityPolicy = [
  "default-src 'self'",
  `script-src 'self' 'unsafe-inline'${development ? " 'unsafe-eval'" : ''}`,
  "style-src 'self' 'unsafe-inline'",
  `img-src 'self' data: blob: ${tiles}`,
  "font-src 'self'",
  `connect-src 'self' data: blob: ${tiles}${development ? ' ws:' : ''}`,
  "worker-src 'self' blob:",
  "object-src 'none'",
  "base-uri 'self'",
  "form-action 'self'",
  "frame-ancestors 'none'",
]
  .map((rule) => rule.trim())
  .join('; ');

/** @type {import('next').NextConfig} */
const config = {
  distDir: process.env.HILUM_DIST_DIR || '.next',
  reactStrictMode: true,
  poweredByHeader: false,
  devIndicators: false,
  serverExternalPackages: [
    '@node-rs/argon2',
    '@libsql/client',
    'libsql',
    'exceljs',
    '@react-pdf/renderer',
    'highs',
    'shpjs',
    'geographiclib-geodesic',
  ],
  typedRoutes: false,
  async headers() {
    return [
      {
        source: '/:path*',
        headers: [
          { key: 'Content-Security-Policy', value: contentSecurityPolicy },
          { key: 'X-Content-Type-Options', value: 'nosniff' },
          { key: 'X-Frame-Options', value: 'DENY' },
          { key: 'Referrer-Policy', value: 'strict-origin-when-cross-origin' },
          { key: 'Permissions-Policy', value: 'camera=(self), geolocation=(self), microphone=()' },
        ],
      },
    ];
  },
};

export default config;
