import * as z from 'zod';

// zod compiles its schemas with `Function` where it can, and finds out by trying. The client's content security policy
// refuses that and reports each try as a violation, so schemas are interpreted everywhere. To be loaded before any schema.
z.config({ jitless: true });
