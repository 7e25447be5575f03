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
