/** Before the first spec that needs PostgreSQL: a throw-away cluster, unless the caller has brought one. */
module.exports = async () => {
  if (process.env.TEST_DATABASE_ADMIN_URL) return;
  const { programList } = await import('../../tools/support/programs.mjs');
  const { startThrowAwayCluster } = await import('../../tools/support/throw-away-cluster.mjs');
  const cluster = await startThrowAwayCluster(programList());
  process.env.TEST_DATABASE_ADMIN_URL = cluster.adminUrl;
  globalThis.__throwAwayCluster = cluster;
};
