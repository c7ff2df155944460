import type { Finding } from '../../outcome';
import { joiningPressure } from '../limits/joiningPressure';
import type { Answer, Call } from '../types';
import type { JoinResults, JoinSettings } from './types';

/** Limits of a join: streams that would have to flow uphill into it. */
export const joinLimits = (call: Call<JoinSettings>, answer: Answer<JoinResults>): Finding[] =>
  joiningPressure(call.unit, call.in, answer.results.P_Pa, call.limits);
