const GREEK: ReadonlyMap<string, string> = new Map([
  ...(
    'alpha beta gamma delta zeta eta theta iota kappa lambda mu nu xi pi rho sigma tau upsilon chi psi omega ' +
    'Gamma Delta Theta Lambda Xi Pi Sigma Upsilon Phi Psi Omega'
  )
    .split(' ')
    .map((name) => [name, `\\${name}`] as const),
  ['eps', '\\varepsilon'],
  ['epsilon', '\\varepsilon'],
  ['phi', '\\varphi'],
  ['inf', '\\infty'],
]);

/** A name that begins with one of these is a change of what follows: Delta_v, delta_v. */
const CHANGES: ReadonlySet<string> = new Set(['Delta', 'delta']);

/**
 * A name as TeX: Greek names become letters, what follows an underscore becomes a subscript (I_sp, T_1), a trailing
 * number too (T1), Delta_v a change of v, m_dot a rate. Anything but letters, digits and _ is dropped.
 */
export function nameTex(name: string): string {
  const parts = name
    .replace(/[^A-Za-z0-9_]/g, '')
    .split('_')
    .filter((part) => part !== '');
  const first = parts[0];
  if (first === undefined) return '?';
  if (CHANGES.has(first) && parts.length > 1) return `\\Delta ${nameTex(parts.slice(1).join('_'))}`;
  const rest = parts.slice(1);
  let base = baseTex(first);
  if (rest[0] === 'dot') {
    base = { ...base, letter: `\\dot{${base.letter}}` };
    rest.shift();
  }
  const subscripts = [...base.subscript, ...rest.map((part) => GREEK.get(part) ?? part)];
  return subscripts.length === 0 ? base.letter : `${base.letter}_{${subscripts.join(',')}}`;
}

function baseTex(part: string): { letter: string; subscript: string[] } {
  const match = /^([A-Za-z]+)(\d+)$/.exec(part);
  const [letters, digits] = [match?.[1] ?? part, match?.[2]];
  const subscript = digits ? [digits] : [];
  if (letters === 'mdot') return { letter: '\\dot{m}', subscript };
  const letter = GREEK.get(letters) ?? (letters.length === 1 ? letters : `\\mathrm{${letters}}`);
  return { letter, subscript };
}
