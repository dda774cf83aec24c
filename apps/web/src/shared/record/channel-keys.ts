export const channelKeys = {
  channel: (channelId: number) => ['channels', channelId] as const,
  records: (channelId: number) => ['channels', channelId, 'record'] as const,
};
