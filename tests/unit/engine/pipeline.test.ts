import { expect, test } from 'vitest'
import { evaluated } from '../../support/sheetText'

test('a solid shaft: torque, diameter, stress, criterion', () => {
  const lines = evaluated(`
\`\`\`given
T = 800 N m -- torque
d_o = 60.0 mm +/- 0.1 -- outside diameter
tau_allow = 60 MPa -- allowable shear stress
\`\`\`

\`\`\`formula
tau = 16*T/(pi*d_o^3) to MPa -- surface shear stress
\`\`\`

\`\`\`criterion
C1: tau <= tau_allow -- shear strength
\`\`\`
`)
  console.log(JSON.stringify([...lines.values()], null, 1))
  expect(lines.get('d_o')?.value?.shown).toBe('60.0 mm')
  expect(lines.get('tau')?.value?.shown).toBe('18.9 MPa')
  expect(lines.get('C1')?.criterion?.satisfied).toBe(true)
})
