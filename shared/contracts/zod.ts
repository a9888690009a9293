import { config } from 'zod';

// Schemas are compiled from text where an engine allows it, and the page's content security policy reports even the
// attempt. Set before the first schema is made, hence here, where every schema gets its `z`.
config({ jitless: true });

// Name by name and not as one object: what no schema uses is then left out of the pages' scripts.
export * from 'zod';
