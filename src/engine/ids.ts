/** Identifiers inside a sketch. Branded, so that a stream's id cannot stand where a unit's belongs. */
export type UnitId = string & { readonly __id: 'unit' };
export type StreamId = string & { readonly __id: 'stream' };
/** Id of a chemical in the sketch: a bank id or the id of an own chemical. */
export type ChemId = string & { readonly __id: 'chemical' };
/** Name of a port within its unit, e.g. 'in1', 'vapour'. */
export type Port = string;
