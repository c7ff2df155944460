import { REQUIREMENT_KINDS } from '../documentTypes';
import { isObject, type JsonObject, own } from '../json';
import type { Json } from '../types';
import type { Problems } from './problem';
import * as value from './value';

type Check = (item: JsonObject, path: string, problems: Problems) => void;

function records(list: Json | undefined, at: string, problems: Problems, check: Check): void {
  if (!value.list(list, at, problems)) return;
  list.forEach((item, k) => {
    if (isObject(item)) check(item, `${at}.${k}`, problems);
    else problems.wrongType(`${at}.${k}`, 'object', item);
  });
}

const texts =
  (required: readonly string[], optional: readonly string[]): Check =>
  (item, path, problems) => {
    for (const key of required) value.name(own(item, key), `${path}.${key}`, problems);
    for (const key of optional) value.text(own(item, key), `${path}.${key}`, problems);
  };

const checkRequirement: Check = (item, path, problems) => {
  texts(['stream', 'of'], ['chemical', 'note'])(item, path, problems);
  value.oneOf(own(item, 'of'), `${path}.of`, problems, REQUIREMENT_KINDS);
  value.oneOf(own(item, 'basis'), `${path}.basis`, problems, ['mole', 'mass']);
  for (const key of ['min', 'max']) value.quantity(own(item, key), `${path}.${key}`, problems);
};

const checkUtility: Check = (item, path, problems) => {
  texts(['name', 'use'], ['note'])(item, path, problems);
  value.oneOf(own(item, 'use'), `${path}.use`, problems, ['heating', 'cooling']);
  for (const key of ['supply', 'back']) value.quantity(own(item, key), `${path}.${key}`, problems);
};

/** Revision table, design basis, HOLDs and what the documents show. */
export function checkDocuments(raw: JsonObject, problems: Problems): void {
  records(
    own(raw, 'revisions'),
    'revisions',
    problems,
    texts(['mark'], ['date', 'what', 'by', 'checked', 'approved']),
  );
  records(own(raw, 'holds'), 'holds', problems, texts(['no', 'what'], ['owner', 'date', 'unit', 'path']));
  const basis = own(raw, 'designBasis');
  if (value.object(basis, 'designBasis', problems)) {
    records(own(basis, 'cases'), 'designBasis.cases', problems, texts(['name'], ['text']));
    records(own(basis, 'requirements'), 'designBasis.requirements', problems, checkRequirement);
    records(own(basis, 'utilities'), 'designBasis.utilities', problems, checkUtility);
    value.quantity(own(basis, 'approach'), 'designBasis.approach', problems);
    for (const key of ['conditions', 'notes']) value.text(own(basis, key), `designBasis.${key}`, problems);
  }
  const choices = own(raw, 'documents');
  if (!value.object(choices, 'documents', problems)) return;
  value.oneOf(own(choices, 'paper'), 'documents.paper', problems, ['A3', 'A4']);
  value.number(own(choices, 'pictureWidth'), 'documents.pictureWidth', problems, 0);
  for (const key of ['withoutRows', 'withoutStreams', 'withoutSections']) {
    const list = own(choices, key);
    if (value.list(list, `documents.${key}`, problems))
      list.forEach((item, k) => {
        value.text(item, `documents.${key}.${k}`, problems);
      });
  }
}
