// The page: fonts, colours, state, window.
import '@fontsource/fira-sans/latin-400.css';
import '@fontsource/fira-sans/latin-500.css';
import '@fontsource/fira-sans/latin-600.css';
import '@fontsource/fira-sans/latin-ext-400.css';
import '@fontsource/fira-sans/latin-ext-500.css';
import '@fontsource/fira-sans/latin-ext-600.css';
import '@fontsource/fira-sans/greek-400.css';
import '@fontsource/fira-sans/greek-500.css';
import '@fontsource/fira-sans/greek-600.css';
import './app.css';
import './base.css';
import { mount } from 'svelte';
import App from './App.svelte';
import { connect } from './state/connect.ts';

const target = document.getElementById('window');
if (target === null) throw new Error('the page has no place for the window');
connect();
mount(App, { target });
