import type { Routes } from '@angular/router';
import { Filler, LinearScale, LineController, LineElement, LogarithmicScale, PointElement } from 'chart.js';
import zoom from 'chartjs-plugin-zoom';
import { provideCharts } from 'ng2-charts';
import { ChannelPage } from './channel';

export const channelRoutes: Routes = [
  {
    path: '',
    component: ChannelPage,
    providers: [
      provideCharts({
        registerables: [
          Filler,
          LinearScale,
          LineController,
          LineElement,
          LogarithmicScale,
          PointElement,
          zoom,
        ],
      }),
    ],
  },
];
