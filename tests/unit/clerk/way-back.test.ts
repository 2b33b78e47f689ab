import { describe, expect, it } from 'vitest';
import { wayBack } from '@/app/[company]/sign-in/way-back';

describe('the way back after signing in', () => {
  it.each([
    ['/quillback', '/quillback'],
    ['/quillback/desk/jobs?stage=signed', '/quillback/desk/jobs?stage=signed'],
    ['/quillback/jobs/1/payments', '/quillback/jobs/1/payments'],
  ])('leads to a page of the contractor: %s', (asked, target) => {
    expect(wayBack('quillback', asked)).toBe(target);
  });

  it.each([
    '',
    'https://elsewhere.example/quillback/desk',
    '//elsewhere.example/quillback',
    '\\\\elsewhere.example\\quillback',
    'javascript:alert(1)',
    '/tern-hollow/desk',
    '/quillback-2/desk',
    '/quillback/../tern-hollow/desk',
    '/quillback/sign-in',
    'http://',
  ])('leads home instead of to: %s', (asked) => {
    expect(wayBack('quillback', asked)).toBe('/quillback');
  });
});
