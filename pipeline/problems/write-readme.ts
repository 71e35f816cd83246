import { writeFileSync } from "node:fs";
import { catalogueAsMarkdown } from "./readme-text.ts";

// Writes the README.md beside this file: npx tsx pipeline/problems/write-readme.ts
writeFileSync(new URL("README.md", import.meta.url), catalogueAsMarkdown());
