import fs from 'node:fs';
import { PGlite } from '@electric-sql/pglite';
import { NodeFS } from '@electric-sql/pglite/nodefs';

type Module = { NODEFS?: Operations; FS: { filesystems: { NODEFS: Operations } } };
type Operations = { stream_ops: { fsync?: (stream: { nfd: number }) => number } };

/**
 * The embedded engine's file system with a real fsync. PGlite's own has none, so that a commit would survive kill -9 but not a
 * power cut. It leans on PGlite's inside: a test counts the calls.
 */
export class DurableNodeFS extends NodeFS {
  override async init(...[pg, options]: Parameters<NodeFS['init']>): ReturnType<NodeFS['init']> {
    const ready = await super.init(pg, options);
    ready.emscriptenOpts.preRun ??= [];
    (ready.emscriptenOpts.preRun as unknown[]).push((module: Module) => {
      const operations = module.NODEFS ?? module.FS.filesystems.NODEFS;
      operations.stream_ops.fsync = ({ nfd }) => {
        fs.fsyncSync(nfd);
        return 0;
      };
    });
    return ready;
  }
}

/** Start parameters that go with it: PGlite's own begin with `-F`, which switches fsync off. */
export const durableStartParams = (): string[] => [
  ...PGlite.defaultStartParams.filter((parameter) => parameter !== '-F'),
  ...['-c', 'wal_sync_method=fsync', '-c', 'max_wal_size=256MB'],
];
