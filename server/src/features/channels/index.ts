export { channelRoutes } from './channels.routes';
export { createChannelsRepository } from './channels.repository';
export { createChannelsService, type ChannelsService } from './channels.service';
export { closeDraftJob, createDraftEvents } from './draft-events';
export { createExchangeService } from './exchange.service';
export { createResolveChannel } from './resolve-channel';
