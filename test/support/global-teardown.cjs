/** After the last spec: ends the cluster that the set-up has started. */
module.exports = async () => {
  await globalThis.__throwAwayCluster?.stop();
};
