import { defineConfig } from "drizzle-kit";

export default defineConfig({ dialect: "turso", schema: "./app/db/schema/*.ts", out: "./drizzle", dbCredentials: { url: "file:./data/bladecount.db" } });
