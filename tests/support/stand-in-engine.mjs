// A tiny engine for tests of the shells: no notebook, no physics. It answers some requests in its own way.
// Its argument is the notebook path, as for the real one.
const [notebookPath] = process.argv.slice(2);
const send = (message) => process.send(message);

process.on('disconnect', () => process.exit(0));
process.on('message', ({ call, name, question }) => {
  const answer = (value) => send({ kind: 'answer', call, answer: { ok: true, value } });
  if (name === 'die') process.exit(3);
  if (name === 'never') return;
  if (name === 'late') setTimeout(() => answer('late'), 900);
  else if (name === 'say') {
    send({ kind: 'event', event: { event: 'worker restarted', reason: question.reason } });
    answer(null);
  } else if (name === 'which notebook') answer(notebookPath);
  else if (name.startsWith('notebook ')) answer({ path: question.path });
  else answer(question);
});
