/** `npm run -s evaluate -- FILE.md`: reads a sheet in text form, evaluates it and prints each line. */
import { runEvaluate } from './evaluation/run'

const { exitCode, out, complaint } = await runEvaluate(process.argv.slice(2))
process.stdout.write(out)
process.stderr.write(complaint)
process.exitCode = exitCode
