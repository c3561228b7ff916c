/**
 * Property tests are the same in every run of `npm test`, so that a red one is about the change; another seed,
 * or many more runs, are asked for by the environment (`npm run test:long` does). fast-check prints the seed
 * of whatever fails.
 */
import fc from 'fast-check'

const seed = process.env['TORFOLIO_TEST_SEED']
const isLong = process.env['TORFOLIO_TEST_LONG'] === 'on'

fc.configureGlobal({
  ...fc.readConfigureGlobal(),
  ...(isLong && !seed ? {} : { seed: Number(seed ?? 20_261_201) }),
})
