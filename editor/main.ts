import './app.ts';
