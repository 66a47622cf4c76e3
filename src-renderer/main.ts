import { mount } from 'svelte';
import App from './App.svelte';
import { connect } from './host';
import { Shell } from './shell.svelte';
import './tokens.css';
import './base.css';
import './forms/forms.css';

const page = document.getElementById('page');
if (page === null) throw new Error('index.html has no element with the id "page"');

const shell = new Shell(connect(), () => new Worker(new URL('./audit-worker.ts', import.meta.url), { type: 'module' }));
mount(App, { target: page, props: { shell } });
void shell.start();
