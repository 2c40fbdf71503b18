import { defineConfig } from "drizzle-kit";

export default defineConfig({
  dialect: "postgresql",
  schema: "./db/schema/index.ts",
  out: "./drizzle",
  // The roles belong to the server, not to one database: db/migrate makes them.
  entities: { roles: { include: [] } },
});
