/** Unit names as one says them, in the singular as in *84.2 megapascal*. Display's own: nothing is computed with them. */
const whole: Record<string, string> = {
  '%': 'percent',
  percent: 'percent',
  '°': 'degree',
  deg: 'degree',
  '°C': 'degree Celsius',
  degC: 'degree Celsius',
  '°F': 'degree Fahrenheit',
  degF: 'degree Fahrenheit',
  degR: 'degree Rankine',
  rad: 'radian',
  rev: 'revolution',
  rpm: 'revolution per minute',
  min: 'minute',
  h: 'hour',
  day: 'day',
  in: 'inch',
  ft: 'foot',
  yd: 'yard',
  mil: 'mil',
  thou: 'thou',
  lb: 'pound',
  lbf: 'pound-force',
  kgf: 'kilogram-force',
  kip: 'kip',
  slug: 'slug',
  psi: 'pound-force per square inch',
  ksi: 'kip per square inch',
  Msi: 'million pound-force per square inch',
  hp: 'horsepower',
  hp_metric: 'metric horsepower',
  BTU: 'British thermal unit',
  tonne: 'tonne',
  t: 'tonne',
  Nm: 'newton metre',
  kNm: 'kilonewton metre',
  MNm: 'meganewton metre',
  Nmm: 'newton millimetre',
  'lbf-in': 'pound-force inch',
  'lbf-ft': 'pound-force foot',
  'ft-lbf': 'foot pound-force',
  'in-lbf': 'inch pound-force',
}

const stems: Record<string, string> = {
  m: 'metre',
  g: 'gram',
  s: 'second',
  A: 'ampere',
  K: 'kelvin',
  mol: 'mole',
  cd: 'candela',
  N: 'newton',
  Pa: 'pascal',
  bar: 'bar',
  J: 'joule',
  cal: 'calorie',
  W: 'watt',
  Hz: 'hertz',
  V: 'volt',
  C: 'coulomb',
  ohm: 'ohm',
  l: 'litre',
  L: 'litre',
  litre: 'litre',
  rad: 'radian',
}

const prefixes: Record<string, string> = {
  p: 'pico',
  n: 'nano',
  u: 'micro',
  '\u00b5': 'micro',
  '\u03bc': 'micro',
  m: 'milli',
  c: 'centi',
  d: 'deci',
  da: 'deca',
  h: 'hecto',
  k: 'kilo',
  M: 'mega',
  G: 'giga',
  T: 'tera',
}

const own = (table: Record<string, string>, key: string): string | undefined =>
  Object.hasOwn(table, key) ? table[key] : undefined

/** `MPa` → `megapascal`; a name it does not know is said as it is written. */
export const spokenUnitName = (name: string): string => {
  const known = own(whole, name) ?? own(stems, name)
  if (known) return known
  for (const length of [1, 2]) {
    const prefix = own(prefixes, name.slice(0, length))
    const stem = own(stems, name.slice(length))
    if (prefix && stem) return prefix + stem
  }
  return name
}
