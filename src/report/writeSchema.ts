import { resultsSchemaText } from './resultsSchema';

/** npx tsx src/report/writeSchema.ts > public/schema/results.schema.json */
process.stdout.write(resultsSchemaText());
