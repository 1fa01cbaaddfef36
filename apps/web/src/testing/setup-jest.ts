import { setupZonelessTestEnv } from 'jest-preset-angular/setup-env/zoneless';

setupZonelessTestEnv();

// jsdom has no canvas: without a context Chart.js stays quiet and the component still renders.
HTMLCanvasElement.prototype.getContext = () => null;
