// Preloaded into a measured process: leaves its peak resident memory, in kB, in the file that BENCH_RSS names.
process.on('exit', () => {
  require('node:fs').writeFileSync(process.env.BENCH_RSS, String(process.resourceUsage().maxRSS));
});
