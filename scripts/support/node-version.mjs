// Imported first: says what is missing before any newer syntax or function is met.
const [major, minor] = process.versions.node.split('.').map(Number);
const supported = (major === 20 && minor >= 19) || (major === 22 && minor >= 12) || major > 22;

if (!supported) {
  console.error(
    `Node ${process.versions.node} is too old. Putlog needs Node 20 (from 20.19) or 22 (from 22.12).`,
  );
  process.exit(1);
}
