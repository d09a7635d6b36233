// @ts-check
// Loaded into the service by the bench `memory`: collects garbage when asked, and says so.
process.on('SIGUSR2', () => {
  for (let time = 0; time < 3; time += 1) globalThis.gc?.();
  // The allocator gives pages back a moment later.
  setTimeout(() => console.log('garbage collected'), 1000);
});
