/** Prints the JSON Schema: `npx tsx src/sketch/writeSchema.ts > public/schema/sketch.schema.json` */
import { schemaText } from './schema';

process.stdout.write(schemaText());
