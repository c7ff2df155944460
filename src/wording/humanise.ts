/** 'vapourFraction' -> 'vapour fraction', 'in2' -> 'in 2', 'duty_W' -> 'duty': a key's own words. */
export const humanised = (key: string): string =>
  (key.split(/[./]/).at(-1) ?? key)
    .replace(/_(K|Pa|W|W_K|mol_s|kg_s|J_kg|J_mol|J_molK|m3_s|m3_mol|kg_m3|Pa_s|m)$/, '')
    .replace(/([a-z])([A-Z])/g, '$1 $2')
    .replace(/([a-zA-Z])(\d)/g, '$1 $2')
    .replace(/[-_]/g, ' ')
    .toLowerCase();

export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
