import { z } from 'zod';

// Schemas are compiled from text where an engine allows it, and the page's content security policy reports even the
// attempt. Set before the first schema is made, hence here, where every schema gets its `z`.
z.config({ jitless: true });

export { z };
