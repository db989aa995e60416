import fc from 'fast-check';

/** The same cases on every machine and every run; `FAST_CHECK_SEED` tries others. */
fc.configureGlobal({ seed: Number(process.env.FAST_CHECK_SEED ?? 20270403) });
