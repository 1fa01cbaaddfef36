export { planRoutes } from './plan.routes';
export { channelRoutes } from './channels.routes';
export { createChannelsRepository, type ChannelsRepository } from './channels.repository';
export { createChannelsService, type ChannelsService, type FollowStackup } from './channels.service';
export { closeDraftJob, createDraftEvents, type DraftEvents } from './draft-events';
export { createExchangeService } from './exchange.service';
export { createResolveChannel } from './resolve-channel';
