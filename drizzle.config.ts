import { defineConfig } from "drizzle-kit";

export default defineConfig({
  dialect: "turso",
  schema: "./app/db/schema/index.ts",
  out: "./drizzle",
  dbCredentials: { url: "file:./data/bladecount.db" },
});
