// @vitest-environment jsdom
import { expect, test } from 'vitest';
import type { Finding } from '../../src/engine/outcome';
import { letDown, makePage, show, unitId } from './page';

const column = {
  stages: 12,
  top: { distillate: 'liquid' },
  bottom: { reboiler: true },
  feeds: { feed1: { stage: 6 } },
  pressure: { top: '5 bar', bottom: '5.2 bar' },
  fixedBy: [],
};
const chamber = { air: { flow: '50 kmol/h', T: '20 degC', P: '5 bar' }, heat: { duty: '0 kW' } };

test.each([
  ['column', 'feed1', column, 'pressure', 'column/one-phase'],
  ['chamber', 'fuel1', chamber, 'air', 'chamber/air-short'],
] as const)(
  'what is said of a group of settings as a whole stands once beside them: %s',
  (kind, port, settings, path, code) => {
    const page = makePage({
      ...letDown,
      units: [...letDown.units.slice(0, 2), { id: 'u3', tag: 'X-1', kind, settings }],
      streams: [letDown.streams[0], { ...letDown.streams[1], to: ['u3', port] }],
    });
    const finding: Finding = { code, weight: 'beyond-limit', at: { unit: unitId('u3'), path }, evidence: [] };
    page.stores.results.setState({ findings: [finding] });
    page.stores.session.select([unitId('u3')]);
    show(page);
    expect(document.querySelectorAll('.field-findings li')).toHaveLength(1);
  },
);
