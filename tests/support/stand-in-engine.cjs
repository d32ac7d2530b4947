// A tiny engine for tests of the shells: no notebook, no physics. It answers some requests in its own way and sends the
// others back as they came. Its last argument is the notebook path, as for the real one.
const port = process.parentPort;
const send = (message) => (port ? port.postMessage(message) : process.send(message));

function receive({ call, name, question }) {
  const answer = (value) => send({ kind: 'answer', call, answer: { ok: true, value } });
  if (name === 'die') process.exit(3);
  if (name === 'never') return;
  if (name === 'late') setTimeout(() => answer('late'), 900);
  else if (name === 'say') {
    send({ kind: 'event', event: { event: 'worker restarted', reason: question.reason } });
    answer(null);
  } else if (name === 'which notebook') answer(process.argv.at(-1));
  else if (name.startsWith('notebook ')) answer({ path: question.path });
  else answer(question);
}

if (port) port.on('message', ({ data }) => receive(data));
else {
  process.on('disconnect', () => process.exit(0));
  process.on('message', receive);
}
