/**
 * The only door to zod: `import * as z from '@/lib/schemas/zod'`.
 * jitless, because the compiled validators need `new Function`, which the content security policy forbids.
 */
import { config } from 'zod';

config({ jitless: true });

export * from 'zod';
