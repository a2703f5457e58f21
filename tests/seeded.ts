/** What is drawn is drawn alike in each run: npm test takes a seeded tenth of npm run test:long. FC_SEED draws others. */
import fc from 'fast-check'

fc.configureGlobal({ seed: Number(process.env.FC_SEED ?? 20260501) })
