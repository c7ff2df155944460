import { word } from '../findings';
import { isObject, type JsonObject, own } from '../json';
import { type Json, TITLE_KEYS } from '../types';
import { checkDocuments } from './documents';
import { checkOwnChemical } from './ownChemical';
import type { FileCode, Problems } from './problem';
import * as value from './value';

/** Every known field has its type, every required one is there, names are unique. What settings mean is judged on compiling. */
export function checkShape(raw: JsonObject, problems: Problems): void {
  value.text(own(raw, 'id'), 'id', problems);
  fields(raw, 'title', problems, (key, v, path) => {
    if (TITLE_KEYS.some((t) => t === key)) value.text(v, path, problems);
  });
  fields(raw, 'site', problems, (key, v, path) => {
    if (['pressure', 'ambient', 'coolingWater'].includes(key)) value.quantity(v, path, problems);
  });
  checkChemicals(own(raw, 'chemicals'), problems);
  checkModel(own(raw, 'model'), problems);
  each(raw, 'units', problems, (unit, path) => checkUnit(unit, path, problems));
  each(raw, 'streams', problems, (stream, path) => checkStream(stream, path, problems));
  unique(own(raw, 'units'), 'units', 'id', 'file/repeated-id', problems);
  unique(own(raw, 'units'), 'units', 'tag', 'file/repeated-tag', problems);
  unique(own(raw, 'streams'), 'streams', 'id', 'file/repeated-id', problems);
  unique(own(raw, 'streams'), 'streams', 'number', 'file/repeated-number', problems);
  checkDisplay(own(raw, 'display'), problems);
  const notes = own(raw, 'notes');
  if (value.list(notes, 'notes', problems))
    notes.forEach((note, k) => {
      checkNote(note, `notes.${k}`, problems);
    });
  fields(raw, 'limits', problems, (_, v, path) => value.quantity(v, path, problems));
  checkDocuments(raw, problems);
}

function fields(
  raw: JsonObject,
  key: string,
  problems: Problems,
  check: (key: string, value: Json, path: string) => void,
): void {
  const record = own(raw, key);
  if (value.object(record, key, problems))
    for (const [k, v] of Object.entries(record)) check(k, v, `${key}.${k}`);
}

/** A required list of records. */
function each(
  raw: JsonObject,
  key: string,
  problems: Problems,
  check: (item: JsonObject, path: string) => void,
): void {
  const items = own(raw, key);
  if (items === undefined) problems.add(key, 'file/missing');
  if (!value.list(items, key, problems)) return;
  items.forEach((item, k) => {
    if (isObject(item)) check(item, `${key}.${k}`);
    else problems.wrongType(`${key}.${k}`, 'object', item);
  });
}

function unique(items: Json | undefined, at: string, key: string, code: FileCode, problems: Problems): void {
  if (!Array.isArray(items)) return;
  const seen = new Set<string>();
  (items as readonly Json[]).forEach((item, k) => {
    const v = isObject(item) ? own(item, key) : undefined;
    if (typeof v !== 'string') return;
    if (seen.has(v)) problems.add(`${at}.${k}.${key}`, code, word('found', v));
    seen.add(v);
  });
}

function checkChemicals(chemicals: Json | undefined, problems: Problems): void {
  if (chemicals === undefined) problems.add('chemicals', 'file/missing');
  if (!value.list(chemicals, 'chemicals', problems)) return;
  const seen = new Set<string>();
  chemicals.forEach((item, k) => {
    const path = `chemicals.${k}`;
    const id = isObject(item) ? own(item, 'id') : item;
    if (isObject(item)) {
      const brought = own(item, 'own');
      if (brought === undefined) problems.add(`${path}.own`, 'file/missing');
      if (value.object(brought, `${path}.own`, problems)) checkOwnChemical(brought, `${path}.own`, problems);
    }
    if (!value.name(id, isObject(item) ? `${path}.id` : path, problems)) return;
    if (seen.has(id)) problems.add(path, 'file/repeated-chemical', word('found', id));
    seen.add(id);
  });
}

function checkModel(model: Json | undefined, problems: Problems): void {
  if (model === undefined) problems.add('model', 'file/missing');
  if (!value.object(model, 'model', problems)) return;
  value.name(own(model, 'kind'), 'model.kind', problems);
  for (const key of ['alpha', 'vapour', 'liquidH', 'liquidVolume'])
    value.text(own(model, key), `model.${key}`, problems);
  for (const key of ['poynting', 'bankPairs']) value.yesNo(own(model, key), `model.${key}`, problems);
  value.list(own(model, 'pairs'), 'model.pairs', problems);
}

function checkUnit(unit: JsonObject, path: string, problems: Problems): void {
  for (const key of ['id', 'tag', 'kind']) value.name(own(unit, key), `${path}.${key}`, problems);
  value.text(own(unit, 'name'), `${path}.name`, problems);
  value.text(own(unit, 'material'), `${path}.material`, problems);
  value.point(own(unit, 'at'), `${path}.at`, problems);
  value.oneOf(own(unit, 'turn'), `${path}.turn`, problems, [0, 90, 180, 270]);
  value.yesNo(own(unit, 'mirror'), `${path}.mirror`, problems);
  value.yesNo(own(unit, 'byHand'), `${path}.byHand`, problems);
  const settings = own(unit, 'settings');
  if (settings === undefined) problems.add(`${path}.settings`, 'file/missing');
  value.object(settings, `${path}.settings`, problems);
}

function checkStream(stream: JsonObject, path: string, problems: Problems): void {
  for (const key of ['id', 'number']) value.name(own(stream, key), `${path}.${key}`, problems);
  value.text(own(stream, 'name'), `${path}.name`, problems);
  for (const key of ['from', 'to']) {
    const end = own(stream, key);
    if (end === undefined) continue;
    if (!Array.isArray(end) || end.length !== 2 || !end.every((v) => typeof v === 'string'))
      problems.wrongType(`${path}.${key}`, 'pair of unit id and port', end);
  }
  const via = own(stream, 'via');
  if (value.list(via, `${path}.via`, problems))
    via.forEach((p, k) => {
      value.point(p, `${path}.via.${k}`, problems);
    });
}

function checkDisplay(display: Json | undefined, problems: Problems): void {
  if (!value.object(display, 'display', problems)) return;
  value.oneOf(own(display, 'set'), 'display.set', problems, ['SI', 'metric', 'US']);
  const labels = own(display, 'labels');
  if (value.list(labels, 'display.labels', problems))
    labels.forEach((label, k) => {
      value.text(label, `display.labels.${k}`, problems);
    });
  const units = own(display, 'units');
  if (value.object(units, 'display.units', problems))
    for (const [key, v] of Object.entries(units)) value.text(v, `display.units.${key}`, problems);
  value.yesNo(own(display, 'gauge'), 'display.gauge', problems);
}

function checkNote(note: Json, path: string, problems: Problems): void {
  if (!isObject(note)) {
    problems.wrongType(path, 'object', note);
    return;
  }
  if (own(note, 'text') === undefined) problems.add(`${path}.text`, 'file/missing');
  for (const key of ['id', 'text', 'on']) value.text(own(note, key), `${path}.${key}`, problems);
  value.point(own(note, 'at'), `${path}.at`, problems);
  value.oneOf(own(note, 'kind'), `${path}.kind`, problems, ['text', 'area']);
  const size = own(note, 'size');
  value.point(size, `${path}.size`, problems);
  if (Array.isArray(size) && (size as readonly Json[]).some((v) => typeof v === 'number' && v <= 0))
    problems.add(`${path}.size`, 'file/out-of-range');
}
