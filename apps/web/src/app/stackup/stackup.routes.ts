import type { Routes } from '@angular/router';
import { StackupPage } from './stackup';

export const stackupRoutes: Routes = [{ path: '', component: StackupPage }];
