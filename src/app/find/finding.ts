/** What a search needs once it is asked for; fetched then. */
export { FoundList } from './FoundList';
export { findThings, thingsOf } from './things';
