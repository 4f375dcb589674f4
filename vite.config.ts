import { reactRouter } from "@react-router/dev/vite";
import tailwindcss from "@tailwindcss/vite";
import { defineConfig } from "vite";
import { appImports } from "./vite.imports.ts";

export default defineConfig({
  plugins: [tailwindcss(), reactRouter()],
  resolve: { alias: appImports },
  // Named up front so that the dev server does not find them late and reload the page;
  // server-only packages are kept out of the client's pre-bundle.
  optimizeDeps: {
    include: ["@conform-to/react", "@conform-to/zod/v4", "zod", "@tanstack/react-table"],
    exclude: ["@libsql/client", "drizzle-orm"],
  },
  server: { host: "127.0.0.1", port: 5173, strictPort: true },
});
