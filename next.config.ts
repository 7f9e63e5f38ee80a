import type { NextConfig } from "next";

/** Largest request body the server takes in, a little over the largest upload (12 MB) so that its own words refuse it. */
const BODY_LIMIT = "13mb";

const config: NextConfig = {
  poweredByHeader: false,
  productionBrowserSourceMaps: false,
  reactStrictMode: true,
  serverExternalPackages: ["sequelize", "pg", "pg-hstore", "pg-boss", "pdfkit", "svg-to-pdfkit", "fontkit", "pino", "nodemailer", "exceljs", "node-forge", "@signpdf/signpdf", "@signpdf/utils"],
  // `npm test` checks the types of the whole tree, tests and scripts included; a start need not do it again.
  typescript: { ignoreBuildErrors: true },
  experimental: { proxyClientMaxBodySize: BODY_LIMIT },
  images: { unoptimized: true },
};

export default config;
