// Read by whatever Node is there, old ones included, before anything that only Node 20 understands.
var version = /^20\.(\d+)\./.exec(process.versions.node);
if (!version || Number(version[1]) < 19) {
  console.error(
    'Steepfall needs Node 20 from 20.19 on, and this is Node ' +
      process.versions.node +
      '; install Node 20 (nodejs.org has it) and start again.',
  );
  process.exit(1);
}
