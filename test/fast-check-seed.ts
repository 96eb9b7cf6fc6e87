import fc from 'fast-check';

/** Property tests draw the same examples in every run; AFTLIMIT_SEED draws others. */
fc.configureGlobal({ seed: Number(process.env.AFTLIMIT_SEED ?? 20_261_201) });
