import type { Routes } from '@angular/router';
import { ChannelPage } from './channel';

export const channelRoutes: Routes = [{ path: '', component: ChannelPage }];
