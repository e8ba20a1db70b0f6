import fc from 'fast-check';

/** One seed for every property test: a run that fails here fails everywhere. A test that gives its own seed keeps it. */
fc.configureGlobal({ ...fc.readConfigureGlobal(), seed: 20_250_301 });
