// Answers what the launcher asks of the hub's command line.
if (process.argv[2] === 'demo-sign-ins')
  process.stdout.write(JSON.stringify([{ role: 'brewer', email: 'brewer@wrenfold.example', password: 'kettle' }]));
