import { describe, expect, test } from 'vitest';
import { answerPageRequest, APP_SCHEME, isOwnAddress, isOwnBlob, PAGE_ADDRESS } from '../../../src-main/window/app-protocol';
import { CONTENT_SECURITY_POLICY } from '../../../src-main/csp';
import type { PageFile } from '../../../src-main/page-files';

const page: PageFile = { bytes: new TextEncoder().encode('<!doctype html>'), type: 'text/html; charset=utf-8' };
const script: PageFile = { bytes: new TextEncoder().encode('export {};'), type: 'text/javascript; charset=utf-8' };
const files = new Map([
  ['/', page],
  ['/index.html', page],
  ['/assets/index-B_9x-.js', script],
]);
const get = (url: string, method = 'GET') => answerPageRequest(files, { url, method });

const TRAVERSALS = [
  'app://tallybeam/..%2fpackage.json',
  'app://tallybeam/..%2Fpackage.json',
  'app://tallybeam/%2e%2e%2fpackage.json',
  'app://tallybeam/%2e%2e/package.json',
  'app://tallybeam/.%2e/package.json',
  'app://tallybeam/%252e%252e%252fpackage.json',
  'app://tallybeam/..%5cpackage.json',
  'app://tallybeam/..\\package.json',
  'app://tallybeam/assets\\index-B_9x-.js',
  'app://tallybeam/%5c%5cserver%5cshare%5cfile',
  'app://tallybeam//server/share/file',
  'app://tallybeam///etc/passwd',
  'app://tallybeam//etc/passwd',
  'app://tallybeam/etc/passwd',
  'app://tallybeam/%2fetc%2fpasswd',
  'app://tallybeam/C:/Windows/win.ini',
  'app://tallybeam/C:%5cWindows%5cwin.ini',
  'app://tallybeam/file:///etc/passwd',
  'app://tallybeam/assets/../../package.json',
  'app://tallybeam/assets/..%2f..%2fpackage.json',
  'app://tallybeam/assets/....//....//package.json',
  'app://tallybeam/assets/%00index-B_9x-.js',
  'app://tallybeam/index.html%00.js',
  'app://tallybeam/index.html%20',
  'app://tallybeam/index.html/',
  'app://tallybeam/index.html/..%2f..%2fx',
  'app://tallybeam/index.html::$DATA',
  'app://tallybeam/index.html.',
  'app://tallybeam/INDEX.HTML',
  'app://tallybeam/%c0%ae%c0%ae/package.json',
  'app://tallybeam/%e0%80%ae%e0%80%ae/package.json',
  'app://tallybeam/..%ef%bc%8fpackage.json',
  'app://tallybeam/．．/package.json',
  'app://tallybeam/..;/package.json',
  'app://tallybeam/~/.ssh/id_rsa',
  'app://tallybeam/proc/self/environ',
  'app://tallybeam/../preload/preload.cjs',
  'app://tallybeam/main/main.js',
  'app://tallybeam/__proto__',
  'app://tallybeam/constructor',
  'app://tallybeam/assets',
  'app://tallybeam/assets/',
  'app://tallybeam/.',
  'app://tallybeam/%',
  'app://tallybeam/%zz',
];

describe('the page under app://tallybeam/', () => {
  test('its files are given with their type and the content security policy', async () => {
    for (const [url, type, text] of [
      [PAGE_ADDRESS, 'text/html; charset=utf-8', '<!doctype html>'],
      ['app://tallybeam', 'text/html; charset=utf-8', '<!doctype html>'],
      ['app://tallybeam/', 'text/html; charset=utf-8', '<!doctype html>'],
      ['app://tallybeam/index.html?x=..%2f#y', 'text/html; charset=utf-8', '<!doctype html>'],
      ['app://tallybeam/assets/index-B_9x-.js', 'text/javascript; charset=utf-8', 'export {};'],
    ] as const) {
      const response = get(url);
      expect([url, response.status, response.headers.get('content-type')]).toEqual([url, 200, type]);
      expect(response.headers.get('content-security-policy')).toBe(CONTENT_SECURITY_POLICY);
      expect(response.headers.get('x-content-type-options')).toBe('nosniff');
      expect(await response.text()).toBe(text);
    }
    expect(await get(PAGE_ADDRESS, 'HEAD').text()).toBe('');
  });

  test.each(TRAVERSALS)('%s gives nothing', async (url) => {
    const response = get(url);
    // A parser that takes ".." out before we see it leaves the root, which is the page itself.
    if (new URL(url).pathname === '/') return expect(await response.text()).toBe('<!doctype html>');
    expect([400, 404]).toContain(response.status);
    expect(response.headers.get('content-security-policy')).toBe(CONTENT_SECURITY_POLICY);
    expect(await response.text()).not.toContain('<!doctype');
  });

  test('a path that reaches the handler as it was written gives nothing either', () => {
    for (const url of TRAVERSALS) expect([200, 400, 404]).toContain(get(url).status);
    expect(TRAVERSALS.filter((url) => get(url).status === 200)).toEqual(['app://tallybeam/.']);
  });

  test.each([
    'app://tallybeam.evil/index.html',
    'app://evil/index.html',
    'app://tallybeam:80/index.html',
    'app://user@tallybeam/index.html',
    'app://tallybeam@evil/index.html',
    'app:///index.html',
    'app:index.html',
    'https://tallybeam/index.html',
    'file:///index.html',
    'apps://tallybeam/index.html',
    '',
  ])('"%s" is not of our page', (url) => {
    expect(isOwnAddress(url)).toBe(false);
    expect(get(url).status).toBe(404);
  });

  test.each(['POST', 'PUT', 'DELETE', 'PATCH', 'OPTIONS', 'TRACE'])('%s is refused', (method) => {
    const response = get(PAGE_ADDRESS, method);
    expect(response.status).toBe(405);
    expect(response.headers.get('content-security-policy')).toBe(CONTENT_SECURITY_POLICY);
  });

  test('only a blob of our own page is our own', () => {
    expect(isOwnBlob('blob:app://tallybeam/0c1f5d6e')).toBe(true);
    for (const url of ['blob:https://evil/1', 'blob:app://tallybeam.evil/1', 'blob:null/1', 'blob:', 'app://tallybeam/1'])
      expect(isOwnBlob(url)).toBe(false);
  });

  test('the scheme has an origin of its own and none of the rights of a trusted server', () => {
    expect(APP_SCHEME).toEqual({ scheme: 'app', privileges: { standard: true, secure: true, supportFetchAPI: true } });
  });
});
