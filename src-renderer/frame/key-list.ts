// Keys that belong to a place rather than to the window.

export const otherKeys = [
  {
    title: 'In the plan line',
    keys: [
      { key: 'Enter', words: 'Change the fragment; a digit begins a new value' },
      { key: 'Space', words: 'Rehearse' },
      { key: 'Esc', words: 'Back to what was there; again, leave the line' },
    ],
  },
  {
    title: 'In a number',
    keys: [
      { key: '↑ ↓', words: 'Step' },
      { key: 'Shift ↑ ↓', words: 'Step by ten' },
      { key: 'Esc', words: 'What was there before' },
    ],
  },
  {
    title: 'On the cell',
    keys: [
      { key: 'A B', words: 'Select a pipette' },
      { key: '← →', words: 'Move it along its branch, 1 µm' },
      { key: 'Shift ← →', words: 'Move it by 10 µm' },
      { key: '+ −', words: 'Zoom' },
      { key: '[ ]', words: 'Turn; with Shift, tilt' },
      { key: 'Delete', words: 'Remove the selected probe' },
    ],
  },
] as const;
