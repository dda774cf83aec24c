import '@fontsource/noto-sans/400.css';
import '@fontsource/noto-sans/600.css';
import './theme/base.css';
import './theme/functional.css';
import './theme/component.css';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { App } from './app/app';

const root = document.getElementById('root');
if (root === null) throw new Error('index.html has no #root');
createRoot(root).render(
  <StrictMode>
    <App />
  </StrictMode>,
);
