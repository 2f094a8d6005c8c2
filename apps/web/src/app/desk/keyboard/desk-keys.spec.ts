import { describe, expect, it } from 'vitest';
import { deskState } from '../state/testing';
import { runCommand, type CommandParts } from './desk-commands';
import { keyGroups, nameKeys, type KeyPress } from './desk-keys';
import { belongsToControl, findKey, type KeyPlace } from './find-key';

const everywhere: KeyPlace = { onStage: true, canEdit: true, charactersOn: true };
const rows = keyGroups.flatMap((group) => group.rows);

function pressing({ key, shift, alt, ctrl }: KeyPress): KeyboardEvent {
  return new KeyboardEvent('keydown', {
    key,
    shiftKey: shift ?? false,
    altKey: alt ?? false,
    ctrlKey: ctrl ?? false,
  });
}

describe('the table of keys', () => {
  it('leads every press to its own command, and lists no press twice', () => {
    const presses = rows.flatMap((row) => row.presses);
    for (const press of presses) expect(findKey(pressing(press), everywhere)).toBe(press.command);
    const names = presses.map((press) => nameKeys(press).join(' '));
    expect(new Set(names).size).toBe(names.length);
  });

  it('keeps what changes the clip from those who may look only, and Tab to the stage', () => {
    const looking = { ...everywhere, canEdit: false };
    expect(findKey(pressing({ key: 'e' }), looking)).toBeNull();
    expect(findKey(pressing({ key: 'ArrowLeft' }), looking)).toBe('step-back');
    expect(findKey(pressing({ key: 'Tab' }), { ...everywhere, onStage: false })).toBeNull();
  });

  it('lets bare characters be switched off, except for the one that shows the keys', () => {
    const off = { ...everywhere, charactersOn: false };
    expect(findKey(pressing({ key: 'n' }), off)).toBeNull();
    expect(findKey(pressing({ key: '?', shift: true }), off)).toBe('show-keys');
    expect(findKey(pressing({ key: 'z', ctrl: true }), off)).toBe('undo');
    expect(findKey(pressing({ key: ' ' }), off)).toBe('play');
  });

  it('does not take browser combinations for letters', () => {
    expect(findKey(pressing({ key: 'c', ctrl: true }), everywhere)).toBeNull();
    expect(findKey(pressing({ key: 'r', ctrl: true }), everywhere)).toBeNull();
  });
});

describe('keys of other controls', () => {
  it('leaves typing, buttons and tabs alone, and nothing else', () => {
    document.body.innerHTML = `
      <input id="text" /><button id="button">Play</button><select id="choice"></select>
      <div role="tablist"><button role="tab" id="tab">Marks</button></div><div id="stage" tabindex="0"></div>`;
    const asked = (id: string, press: KeyPress): boolean => {
      let answer = false;
      const target = document.getElementById(id);
      const listen = (event: KeyboardEvent) => (answer = belongsToControl(event));
      target?.addEventListener('keydown', listen);
      target?.dispatchEvent(pressing(press));
      return answer;
    };
    expect(asked('text', { key: 'e' })).toBe(true);
    expect(asked('text', { key: 'z', ctrl: true })).toBe(true);
    expect(asked('choice', { key: 'ArrowLeft' })).toBe(true);
    expect(asked('button', { key: ' ' })).toBe(true);
    expect(asked('button', { key: 'ArrowLeft' })).toBe(false);
    expect(asked('tab', { key: 'ArrowLeft' })).toBe(true);
    expect(asked('tab', { key: 'n' })).toBe(false);
    expect(asked('stage', { key: 'Enter' })).toBe(false);
  });
});

describe('commands', () => {
  const parts = (): CommandParts => ({
    state: deskState(),
    stage: {} as CommandParts['stage'],
    showKeys: () => undefined,
    leaveStage: () => undefined,
  });

  it('moves between joints with Tab and lets go past the last', () => {
    const desk = parts();
    desk.state.goTo(74);
    expect(desk.state.joint()).toBe('shoulder');
    expect(runCommand('joint-after', desk)).toBe(true);
    expect(runCommand('joint-after', desk)).toBe(true);
    expect(desk.state.joint()).toBe('wrist');
    expect(runCommand('joint-after', desk)).toBe(false);
    runCommand('joint-before', desk);
    runCommand('joint-before', desk);
    expect(runCommand('joint-before', desk)).toBe(false);
  });

  it('walks the marked frames of the chosen arm', () => {
    const desk = parts();
    desk.state.goTo(80);
    runCommand('marked-after', desk);
    expect(desk.state.frame()).toBe(84);
    runCommand('marked-before', desk);
    runCommand('marked-before', desk);
    expect(desk.state.frame()).toBe(50);
    runCommand('marked-before', desk);
    expect(desk.state.frame()).toBe(50);
    expect(desk.state.spoken()?.refused).toBe(true);
  });

  it('keeps the speed between its slowest and its fastest', () => {
    const desk = parts();
    runCommand('faster', desk);
    expect(desk.state.play.speed()).toBe(1);
    for (let i = 0; i < 6; i += 1) runCommand('slower', desk);
    expect(desk.state.play.speed()).toBe(0.125);
  });
});
