import type { Dimension } from '../dimensions/dimension'
import type { UnitPhrase } from '../parse/expression'

/** The unit in which a result of this dimension is shown where its author asked for none. */
export declare const defaultUnit: (dimension: Dimension, system: 'SI' | 'US') => UnitPhrase
