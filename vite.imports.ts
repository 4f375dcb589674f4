import { fileURLToPath } from "node:url";

/**
 * `#app/*` without file endings, for Vite and Vitest. Node's own resolution of package.json `imports`
 * does not try endings one after another; TypeScript does, and so does this alias.
 */
export const appImports = [{ find: /^#app\//, replacement: fileURLToPath(new URL("./app/", import.meta.url)) }];
