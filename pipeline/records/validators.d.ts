// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.
import type { ValidateFunction } from "ajv";
import type { CollectionCard } from "./generated/collection.ts";
import type { SourceCard } from "./generated/source-card.ts";

export const validateCollectionCard: ValidateFunction<CollectionCard>;
export const validateSourceCard: ValidateFunction<SourceCard>;
