/** Comparisons, also as the relation of a criterion; one that does not hold is shown struck, never as if it held. */
import { atLeast } from './brackets'
import { binding, operator, row, type Drawn } from './drawn'

export type Comparison = '<' | '<=' | '>' | '>=' | '==' | '!='

interface Sign {
  tex: string
  character: string
  speech: string
}

const signs: Record<Comparison, Sign> = {
  '<': { tex: '<', character: '<', speech: 'is less than' },
  '<=': { tex: '\\le ', character: '≤', speech: 'is at most' },
  '>': { tex: '>', character: '>', speech: 'is greater than' },
  '>=': { tex: '\\ge ', character: '≥', speech: 'is at least' },
  '==': { tex: '=', character: '=', speech: 'equals' },
  '!=': { tex: '\\ne ', character: '≠', speech: 'is not equal to' },
}

const denied: Record<Comparison, Sign> = {
  '<': { tex: '\\nless ', character: '≮', speech: 'is not less than' },
  '<=': { tex: '\\nleq ', character: '≰', speech: 'is not at most' },
  '>': { tex: '\\ngtr ', character: '≯', speech: 'is not greater than' },
  '>=': { tex: '\\ngeq ', character: '≱', speech: 'is not at least' },
  '==': { tex: '\\ne ', character: '≠', speech: 'is not equal to' },
  '!=': { tex: '=', character: '=', speech: 'equals' },
}

export interface Link {
  relation: Comparison
  side: Drawn
  /** False sets the sign struck through. */
  holds?: boolean
}

/** A chain such as `a ≤ x = 3 ≤ b`; one link is the plain comparison. */
export const drawChain = (start: Drawn, links: readonly Link[]): Drawn =>
  links.reduce(
    (drawn, { relation, side, holds = true }) => {
      const right = atLeast(binding.sum, side)
      const sign = (holds ? signs : denied)[relation]
      return {
        tex: drawn.tex + sign.tex + right.tex,
        print: row(drawn.print, operator(sign.character), right.print),
        speech: `${drawn.speech} ${sign.speech} ${right.speech}`,
        binding: binding.comparison,
        height: Math.max(drawn.height, right.height),
        first: drawn.first,
        last: right.last,
      }
    },
    atLeast(binding.sum, start),
  )
