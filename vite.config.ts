import { fileURLToPath } from "node:url";
import react from "@vitejs/plugin-react";
import { defineConfig } from "vitest/config";

const at = (path: string) => fileURLToPath(new URL(path, import.meta.url));

export default defineConfig({
  plugins: [react()],
  test: { include: ["tests/**/*.test.{ts,tsx}"], root: at("."), testTimeout: 60_000, globalSetup: [] },
});
