import type { Finding } from '../../outcome';
import { joiningPressure } from '../limits/joiningPressure';
import type { Answer, Call } from '../types';
import type { JoinResults, JoinSettings } from './types';

export const joinLimits = (call: Call<JoinSettings>, answer: Answer<JoinResults>): Finding[] =>
  joiningPressure(call.unit, call.in, answer.results.P_Pa, call.limits);
