import type { Analysis } from '../../engine/contracts'
import { figure, sketch } from './figure'
import { method } from './method'
import { solve } from './solve'
import { spec } from './spec'

export const shaftLine: Analysis = { spec, solve, method, figure, sketch }
