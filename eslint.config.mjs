import nextCoreWebVitals from "eslint-config-next/core-web-vitals";
import nextTypeScript from "eslint-config-next/typescript";

const config = [
  { ignores: ["node_modules/", ".next/", ".data/", "coverage/", "gallery/", "next-env.d.ts", "tests/golden/"] },
  ...nextCoreWebVitals,
  ...nextTypeScript,
  {
    rules: {
      "no-console": ["error", { allow: ["error", "warn"] }],
      "no-eval": "error",
      "no-implied-eval": "error",
      "no-new-func": "error",
      eqeqeq: ["error", "always", { null: "ignore" }],
      "prefer-const": "error",
      // Only pages and routes are CommonJS modules to Next; a variable of this name is fine.
      "@next/next/no-assign-module-variable": "off",
      "max-lines": ["error", { max: 300 }],
      "@typescript-eslint/no-unused-vars": ["error", { argsIgnorePattern: "^_", varsIgnorePattern: "^_" }],
      "@typescript-eslint/no-explicit-any": "error",
    },
  },
  { files: ["scripts/**", "tests/**"], rules: { "no-console": "off" } },
];

export default config;
