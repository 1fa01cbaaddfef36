export { DeskService } from './desk.service';
export { createFollowStackup } from './following';
export { createStackupsRepository } from './stackups.repository';
export { stackupRoutes } from './stackups.routes';
export { createStackupsService, type StackupsService } from './stackups.service';
export { createUseStackup } from './use-stackup';
