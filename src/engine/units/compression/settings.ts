import type { ResultSpec, SettingSpec } from '../types';

/** Outlet of a machine: pressure, ratio of outlet to inlet, or temperature. */
export const machineOutlet: SettingSpec = {
  is: 'some',
  count: 1,
  of: {
    P: { is: 'quantity', dim: 'pressure', min: 0 },
    ratio: { is: 'quantity', dim: 'number', min: 0 },
    T: { is: 'quantity', dim: 'temperature', min: 0 },
  },
};

/** Isentropic or polytropic efficiency [-]; absent: an assumption. */
export const machineEfficiency: SettingSpec = {
  is: 'some',
  count: 1,
  of: {
    isentropic: { is: 'quantity', dim: 'fraction', min: 0.01, max: 1 },
    polytropic: { is: 'quantity', dim: 'fraction', min: 0.01, max: 1 },
  },
  otherwise: {
    value: { isentropic: 0.75 },
    text: '75 %',
    why: 'No efficiency was given; 75 % isentropic is common practice in early design.',
  },
};

/** Efficiency of motor and drive [-]: for electric power only. */
export const machineDrive: SettingSpec = {
  is: 'quantity',
  dim: 'fraction',
  min: 0.01,
  max: 1,
  optional: true,
};

/** What compressors and expanders show; see MachineResults. */
export const MACHINE_RESULTS: Readonly<Record<string, ResultSpec>> = {
  power_W: { dim: 'power' },
  electric_W: { dim: 'power' },
  P_Pa: { dim: 'pressure' },
  ratio: { dim: 'number' },
  T_K: { dim: 'temperature' },
  isentropicT_K: { dim: 'temperature' },
  isentropicEfficiency: { dim: 'fraction', percent: true },
  polytropicEfficiency: { dim: 'fraction', percent: true },
  isentropicHead_J_kg: { dim: 'massEnergy' },
  polytropicHead_J_kg: { dim: 'massEnergy' },
  suctionVolume_m3_s: { dim: 'volumeFlow' },
  dewMargin_K: { dim: 'temperatureDifference' },
};
