/** Unit names as one says them, in the singular as in *84.2 megapascal*. */
import { unitsSpelled } from '../units/registry'

/** `MPa` → `megapascal`, `kNm` → `kilonewton metre`; a name that no unit has is said as it is written. */
export const spokenUnitName = (spelling: string): string =>
  unitsSpelled(spelling)
    ?.map(({ spoken }) => spoken)
    .join(' ') ?? spelling
