import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import './app/theme.css';
import { App } from './app/app.tsx';

const root = document.getElementById('root');
if (!root) throw new Error('The page has no element with the id root.');
createRoot(root).render(
  <StrictMode>
    <App />
  </StrictMode>,
);
