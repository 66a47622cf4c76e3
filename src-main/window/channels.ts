/** The IPC channels: one for each method of `Host`, and no other. */
import type { HostMethod } from '../../src-core/host-wire';

export const channelOf = (method: HostMethod): string => `host:${method}`;
