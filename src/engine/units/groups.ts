import type { SettingSpec } from './types';

/** Groups of settings that several kinds share. Pressures are absolute; ratio is outlet to inlet. */
const pressureKeys: Readonly<Record<string, SettingSpec>> = {
  P: { is: 'quantity', dim: 'pressure', min: 0 },
  drop: { is: 'quantity', dim: 'pressureDifference' },
  ratio: { is: 'quantity', dim: 'number', min: 0 },
};

/** Outlet pressure that must be given: a valve without one has no job. */
export const pressureGiven: SettingSpec = { is: 'some', count: 1, of: pressureKeys };

/** Outlet pressure; absent: none is lost. With several inlets drop and ratio count from the lowest of them. */
export const pressure: SettingSpec = {
  is: 'some',
  count: 1,
  of: pressureKeys,
  otherwise: { value: { drop: 0 }, text: '0 bar', why: 'No pressure drop was given.' },
};

/** Heat: absent means adiabatic. Temperature and vapour fraction together make the pressure a result. */
export const heat: SettingSpec = {
  is: 'some',
  count: [1, 2],
  of: {
    T: { is: 'quantity', dim: 'temperature', min: 0 },
    duty: { is: 'quantity', dim: 'power' },
    vapourFraction: { is: 'quantity', dim: 'fraction', min: 0, max: 1 },
  },
  pairs: [['T', 'vapourFraction']],
  optional: true,
};

/** The ways to say what a heater or cooler does, as top-level settings; one of them, or T with vapourFraction. */
export const outletCondition: Readonly<Record<string, SettingSpec>> = {
  T: { is: 'quantity', dim: 'temperature', min: 0, optional: true },
  duty: { is: 'quantity', dim: 'power', optional: true },
  dT: { is: 'quantity', dim: 'temperatureDifference', optional: true },
  vapourFraction: { is: 'quantity', dim: 'fraction', min: 0, max: 1, optional: true },
  subcooling: { is: 'quantity', dim: 'temperatureDifference', min: 0, optional: true },
  superheat: { is: 'quantity', dim: 'temperatureDifference', min: 0, optional: true },
};

/** Compiled forms of the groups. */
export type PressureSI = { readonly P: number } | { readonly drop: number } | { readonly ratio: number };
export interface HeatSI {
  readonly T?: number;
  readonly duty?: number;
  readonly vapourFraction?: number;
}
export interface OutletConditionSI extends HeatSI {
  readonly dT?: number;
  readonly subcooling?: number;
  readonly superheat?: number;
}
