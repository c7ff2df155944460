import type { FromWorker, ToWorker } from '../../src/protocol/messages';
import type { WorkerLike } from '../../src/store/solverClient';

/** A worker that says only what the test lets it say. */
export class Puppet implements WorkerLike {
  readonly got: ToWorker[] = [];
  ended = false;
  onmessage: WorkerLike['onmessage'] = null;
  onerror: WorkerLike['onerror'] = null;
  postMessage(message: ToWorker): void {
    this.got.push(message);
  }
  terminate(): void {
    this.ended = true;
  }
  say(data: FromWorker): void {
    this.onmessage?.({ data } as MessageEvent<FromWorker>);
  }
  crash(message: string): void {
    this.onerror?.({ message } as ErrorEvent);
  }
}
