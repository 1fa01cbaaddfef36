import type { FollowStackup } from '../channels';
import type { StackupsRepository } from './stackups.repository';

/** A draft without a reference has a stackup of its own; one of the same content as the newest is not behind it. */
export function createFollowStackup(repository: StackupsRepository): FollowStackup {
  return async (revisionId, channel, transaction) => {
    const named = channel.library?.stackupVersion;
    const version = named === undefined ? undefined : await repository.one(named, transaction);
    if (!version) return { versionId: undefined, behind: false };
    const newest = await repository.newest(revisionId, transaction);
    return { versionId: version.id, behind: newest !== undefined && newest.sha256 !== version.sha256 };
  };
}
