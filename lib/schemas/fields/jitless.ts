import * as z from 'zod';

/** Compiled parsers need `eval`, which the content security policy forbids. Import before building any schema. */
z.config({ jitless: true });
