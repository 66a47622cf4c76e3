import { mount } from 'svelte';
import App from './App.svelte';
import { connect } from './host';
import { Shell } from './state/shell.svelte';
import { startWorker } from './auditing/start-worker';
import './tokens.css';
import './base.css';
import './forms/forms.css';

const page = document.getElementById('page');
if (page === null) throw new Error('index.html has no element with the id "page"');

const shell = new Shell(connect(), startWorker);
mount(App, { target: page, props: { shell } });
void shell.start();
