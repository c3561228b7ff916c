import type { SolvedInput } from '../../engine/contracts'

/** How the line was solved, for the document. */
export const method = (inputs: Record<string, SolvedInput>): string[] => {
  const isIndeterminate = inputs['start'] === 'fixed' && inputs['end'] === 'fixed'
  return [
    'The line is divided at every change of section and at every torque. Equilibrium gives the internal torque of each piece; each piece twists by $T*L/(G*J)$ and the rotations add up along x.',
    isIndeterminate
      ? 'Both ends are held, so equilibrium alone does not give the reactions. They follow from the stiffness method with exact elements; for a line held at its two ends this is the condition that the end does not turn, $T_end = -T_ext*c_x/c_L$ summed over the torques, with the flexibility $c = L/(G*J)$ added up from the start.'
      : 'The reactions follow from equilibrium alone.',
    'The nominal stress of a round segment is $tau = T*d/(2*J)$; of any other, $tau = T/W_t$ with the modulus of its section line. At a step with a fillet the peak stress is $tau_peak = K_ts*tau$, with the nominal stress of the smaller diameter.',
  ]
}
