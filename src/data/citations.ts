/** What every source tag of the bank stands for. The converter writes those in use to bank/sources.json. */
export const CITATIONS: Readonly<Record<string, string>> = {
  EOS: 'Reference multiparameter equation of state of the fluid (each published in J. Phys. Chem. Ref. Data or a journal like it), as carried by the open CoolProp fluid files: critical and triple point, omega from its vapour pressure',
  'EOS-fit':
    'Least-squares fit of our own to saturation properties or ideal-gas Cp of the reference multiparameter equation of state of the fluid, as carried by the open CoolProp fluid files or by published polynomial fits of such equations; largest deviation of the fit in the note',
  'Perry8-2-8':
    "Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2008, Table 2-8 (vapour pressure)",
  'Perry8-2-32':
    "Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2008, Table 2-32 (liquid density)",
  'Perry8-2-150':
    "Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2008, Table 2-150 (heat of vaporisation)",
  'Perry8-2-153':
    "Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2008, Table 2-153 (liquid heat capacity)",
  'Perry8-2-312':
    "Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2008, Table 2-312 (vapour viscosity)",
  'Perry8-2-313':
    "Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2008, Table 2-313 (liquid viscosity)",
  'Perry8-2-314':
    "Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2008, Table 2-314 (vapour conductivity)",
  'Perry8-2-315':
    "Perry's Chemical Engineers' Handbook, 8th ed., McGraw-Hill 2008, Table 2-315 (liquid conductivity)",
  VDI: 'VDI Heat Atlas, 2nd ed., Springer 2010, section D3',
  McGarry: 'McGarry, Ind. Eng. Chem. Process Des. Dev. 22 (1983) 313 (Wagner constants)',
  'Poling-Wagner':
    "Poling, Prausnitz & O'Connell, The Properties of Gases and Liquids, 5th ed., McGraw-Hill 2001, appendix A (Wagner constants)",
  Poling:
    "Poling, Prausnitz & O'Connell, The Properties of Gases and Liquids, 5th ed., McGraw-Hill 2001, appendix A",
  Clausius:
    'Heat of vaporisation from the slope of the chosen vapour pressure (Clapeyron, virial vapour, chosen liquid density), then a two-parameter power law in 1 - Tr',
  'CRC-2pt':
    'CRC Handbook of Chemistry and Physics, heat of vaporisation at the boiling point and 298.15 K, power law through both',
  'CRC-Watson':
    'CRC Handbook of Chemistry and Physics, heat of vaporisation at the boiling point, carried on with exponent 0.38 (Watson 1943)',
  'Rackett-1pt(CRC)':
    'Rackett equation through one tabulated density (CRC Handbook of Chemistry and Physics or CAS Common Chemistry)',
  'NASA-Glenn': 'McBride, Zehe & Gordon, NASA/TP-2002-211556 (nine-coefficient data)',
  'TRC-fit':
    'Kabo & Roganov / Frenkel et al., Thermodynamics of Organic Compounds in the Gas State, TRC 1994; the published form refitted (largest deviation 0.35 %, mostly below 0.1 %)',
  Burcat:
    'Burcat & Ruscic, Third Millennium Ideal Gas and Condensed Phase Thermochemical Database (2005 and later)',
  monatomic: 'Monatomic ideal gas, Cp = 5/2 R',
  'est-diff':
    'Estimate: ideal-gas Cp by difference of similar molecules; scheme in the note; 3 to 7 % near 298 K, less when hot',
  'est-Benson':
    'Estimate: group heat capacities after Benson, Thermochemical Kinetics, 2nd ed., Wiley 1976; not checked against the printed table',
  'est-CSP':
    "Estimate: liquid Cp by corresponding states (Rowlinson & Bondi, in Poling, Prausnitz & O'Connell, 5th ed., eq. 6-6.4)",
  'est-CSP+CRC':
    'Estimate: liquid Cp by corresponding states (Rowlinson & Bondi), scaled to the 298.15 K value of the CRC Handbook of Chemistry and Physics',
  'est-CSP+Poling':
    "Estimate: liquid Cp by corresponding states (Rowlinson & Bondi), scaled to the 298.15 K value of Poling, Prausnitz & O'Connell, 5th ed.",
  Zabransky:
    'Zabransky, Ruzicka & Domalski, J. Phys. Chem. Ref. Data 30 (2001) 1199 and earlier volumes (liquid heat capacity)',
  Viswanath: 'Viswanath, Ghosh, Prasad, Dutt & Rani, Viscosity of Liquids, Springer 2007',
  'Dutt-Prasad':
    'Viswanath & Natarajan, Data Book on the Viscosity of Liquids, 1989, and the compilation of Dutt & Prasad',
  Mulero: 'Mulero, Cachadina & Parra, J. Phys. Chem. Ref. Data 41 (2012) 043105',
  Somayajulu: 'Somayajulu, Int. J. Thermophys. 9 (1988) 559, revised coefficients',
  Jasper: "Jasper, J. Phys. Chem. Ref. Data 1 (1972) 841, as printed in Lange's Handbook of Chemistry",
  'fit:lb':
    'Wagner curve fitted by us to Antoine curves of Landolt-Boernstein, New Series IV/20 (vapour pressure), tied to the critical point; data range in the note',
  Knapp1982:
    'Knapp, Doering, Oellrich, Ploecker & Prausnitz, Vapor-Liquid Equilibria for Mixtures of Low Boiling Substances, DECHEMA Chemistry Data Series VI (1982)',
  IUPAC:
    'Ambrose, Tsonopoulos and co-workers, Vapor-Liquid Critical Properties of Elements and Compounds, parts 1 to 12, J. Chem. Eng. Data 1995 to 2015 (IUPAC recommended values)',
  CRC: 'CRC Handbook of Chemistry and Physics',
  'CRC/OpenNotebook (triple)':
    'Triple point, agreeing with the melting points of the CRC Handbook and the Open Notebook Science collection',
  'EOS (triple)': 'Triple point of the reference equation of state of the fluid',
  'EOS(Tmin)': 'Lowest temperature of the reference equation of state of the fluid',
  Yaws: 'Yaws, Thermophysical Properties of Chemicals and Hydrocarbons, 2nd ed., Gulf 2014',
  'Yaws (sublimation point)':
    'Yaws, Thermophysical Properties of Chemicals and Hydrocarbons, 2nd ed., Gulf 2014; sublimation point',
  PSRK: 'Horstmann, Jabloniec, Krafczyk, Fischer & Gmehling, Fluid Phase Equilib. 227 (2005) 157, appendix',
  WebBook: 'NIST Chemistry WebBook, Standard Reference Database 69',
  'from-psat': 'Derived from the chosen vapour-pressure curve',
  ATcT: 'Ruscic & Bross, Active Thermochemical Tables, version 1.112',
  JANAF: 'Chase, NIST-JANAF Thermochemical Tables, 4th ed., J. Phys. Chem. Ref. Data Monograph 9 (1998)',
  NASA: 'McBride, Zehe & Gordon, NASA/TP-2002-211556',
  API: 'API Technical Data Book, Petroleum Refining, as given by Albahri',
  NFPA497: 'NFPA 497-2008, Classification of Flammable Liquids, Gases, or Vapors',
  IEC60079: 'IEC 60079-20-1:2010, Material characteristics for gas and vapour classification',
  Serat: 'Serat, Flash points of organic compounds (2017 collection)',
  Wikidata: 'Wikidata',
  CommonChem: 'CAS Common Chemistry',
  CODATA: 'Cox, Wagman & Medvedev, CODATA Key Values for Thermodynamics, Hemisphere 1989',
  element: 'Element in its standard state: zero by definition',
  derived: 'Derived from other values of this table',
};

const CURVES: Readonly<Record<string, string>> = {
  lb: 'Landolt-Boernstein, New Series IV/20',
  mcg: 'McGarry 1983',
  perry: "Perry's Handbook, 8th ed., Table 2-8",
  vdi: 'VDI Heat Atlas, 2nd ed.',
  wpol: "Poling, Prausnitz & O'Connell, 5th ed.",
  coolpropEOS: 'the equation of state for propylene glycol in the open CoolProp fluid files, 330 to 570 K',
};

/** Full citation of a tag, or undefined for a tag that is unknown. */
export function citationOf(tag: string): string | undefined {
  const known = CITATIONS[tag];
  if (known !== undefined) return known;
  if (!tag.startsWith('fit:')) return undefined;
  const names = tag
    .slice(4)
    .split('+')
    .map((part) => CURVES[part]);
  return names.every((name) => name !== undefined)
    ? `Wagner curve fitted by us to ${names.join(' and ')}, tied to the critical point; data range in the note`
    : undefined;
}
