/**
 * Schemas are not compiled with `new Function`: the content security policy forbids it, and even the attempt is
 * reported. Set on the global that the schema package reads, so that the sign-in page need not load the package.
 */
(globalThis as { __zod_globalConfig?: { jitless: boolean } }).__zod_globalConfig = { jitless: true };
