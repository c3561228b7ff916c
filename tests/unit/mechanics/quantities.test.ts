import { expect, test } from 'vitest'
import { sameDimension } from '@shared/engine/dimensions/dimension'
import { dimensionOfUnit, readUnit } from '@shared/engine/units/unit'
import * as quantities from '@shared/mechanics/quantities'

test.each(Object.entries(quantities))(
  'both units of %s are read and have its dimension',
  (_name, { dimension, unit }) => {
    for (const text of [unit.SI, unit.US]) {
      if (text === '') continue
      const read = readUnit(text)
      if (!read.phrase) throw new Error(`${text} is not read as a unit`)
      expect(sameDimension(dimensionOfUnit(read.phrase), dimension), text).toBe(true)
    }
  },
)
