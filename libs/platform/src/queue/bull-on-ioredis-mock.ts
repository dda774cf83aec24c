import RedisMock from 'ioredis-mock';
import { unpack } from 'msgpackr';

/**
 * ioredis-mock as Bull needs it. The mock's Lua lacks cmsgpack, cjson and bit, hands floats where Redis hands integers and leaves
 * junk for scripts without a return value; its brpoplpush does not block. What is missing is put before every script, and
 * MessagePack arguments are unpacked here and handed to Lua as text.
 */

type Command = (...args: unknown[]) => Promise<unknown>;
interface ScriptDefinition {
  lua: string;
  numberOfKeys?: number;
}
interface MockInternals {
  defineCommand(name: string, definition: ScriptDefinition): void;
  customCommands: Record<string, Command>;
  rpoplpush: Command;
  brpoplpush: Command;
  quit: Command;
  connect: Command;
  client: Command;
  disconnect(...args: unknown[]): unknown;
}
interface Wait {
  wake(): void;
  timer: NodeJS.Timeout;
}

const LUA_PRELUDE = String.raw`
do
  local function integer(v)
    if math.type(v) == 'float' and v == math.floor(v) and v < 2147483648 and v > -2147483648 then return math.tointeger(v) end
    return v
  end
  local function texts(...)
    local t = table.pack(...)
    for i = 1, t.n do
      local v = t[i]
      if type(v) == 'number' then
        if math.type(v) == 'integer' then t[i] = tostring(v)
        elseif v == math.floor(v) and v < 1e17 and v > -1e17 then t[i] = string.format('%.0f', v)
        else t[i] = string.format('%.17g', v) end
      end
    end
    return table.unpack(t, 1, t.n)
  end
  local call, pcall_ = redis.call, redis.pcall
  redis.call = function(...) return integer(call(texts(...))) end
  redis.pcall = function(...) return integer(pcall_(texts(...))) end
end
bit = { band = function(a, b) return a & b end, bor = function(a, b) return a | b end }
cmsgpack = { unpack = function(s)
  if s:sub(1, 1) == 'S' then return s:sub(2) end
  local t = {}
  for k, v in s:sub(2):gmatch('(%a+)=([-%d.]+)') do t[k] = tonumber(v) end
  return t
end }
cjson = { decode = function(s)
  local i = 1
  local value
  local function blank() i = s:find('[^%s]', i) or #s + 1 end
  local function text()
    local j, out = i + 1, {}
    while true do
      local c = s:sub(j, j)
      if c == '"' then i = j + 1 return table.concat(out)
      elseif c == '\\' then out[#out + 1] = s:sub(j + 1, j + 1) j = j + 2
      else out[#out + 1] = c j = j + 1 end
    end
  end
  function value()
    blank()
    local c = s:sub(i, i)
    if c == '{' then
      local t = {}
      i = i + 1 blank()
      if s:sub(i, i) == '}' then i = i + 1 return t end
      while true do
        blank()
        local k = text()
        blank() i = i + 1
        t[k] = value()
        blank()
        local d = s:sub(i, i) i = i + 1
        if d == '}' then return t end
      end
    elseif c == '[' then
      local t = {}
      i = i + 1 blank()
      if s:sub(i, i) == ']' then i = i + 1 return t end
      while true do
        t[#t + 1] = value()
        blank()
        local d = s:sub(i, i) i = i + 1
        if d == ']' then return t end
      end
    elseif c == '"' then return text()
    elseif s:sub(i, i + 3) == 'true' then i = i + 4 return true
    elseif s:sub(i, i + 4) == 'false' then i = i + 5 return false
    elseif s:sub(i, i + 3) == 'null' then i = i + 4 return nil
    else
      local n = s:match('^-?[%d.eE+-]+', i)
      i = i + #n
      return tonumber(n)
    end
  end
  return value()
end }
`;

const POLL_MS = 10;

function asLuaText(unpacked: unknown): string {
  if (typeof unpacked === 'string') return `S${unpacked}`;
  const fields = Object.entries((unpacked ?? {}) as Record<string, unknown>).filter(([, value]) => value != null);
  return `M${fields.map(([key, value]) => `${key}=${String(value)}`).join(';')}`;
}

function argument(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(argument);
  return value instanceof Uint8Array ? asLuaText(unpack(value)) : value;
}

export class BullOnIoredisMock extends RedisMock {
  private isStopped = false;
  private readonly waits = new Set<Wait>();

  constructor(options?: object) {
    super(options as never);
    this.prepareScripts();
    this.prepareBlockingPop();
  }

  /** The mock sets every command as an own property in its constructor, so they are replaced on the instance. */
  private get commands(): MockInternals {
    return this as unknown as MockInternals;
  }

  private prepareScripts(): void {
    const commands = this.commands;
    const define = commands.defineCommand.bind(commands);
    commands.defineCommand = (name, definition) => {
      const lua = `${LUA_PRELUDE}\nlocal function __main()\n${definition.lua}\nend\nlocal __r = __main() if __r == nil then return false end return __r`;
      define(name, { ...definition, lua });
      const byName = this as unknown as Record<string, Command>;
      const inner = byName[name];
      byName[name] = async (...args) => {
        const answer = await inner(...args.map(argument));
        return answer === false || answer === undefined ? null : answer;
      };
      commands.customCommands[name] = byName[name];
    };
  }

  private prepareBlockingPop(): void {
    const commands = this.commands;
    const pop = commands.rpoplpush;
    const quit = commands.quit;
    const connect = commands.connect;
    commands.client = () => Promise.resolve('OK');
    commands.brpoplpush = async (source, destination, timeoutSeconds) => {
      const end = Number(timeoutSeconds) > 0 ? performance.now() + Number(timeoutSeconds) * 1000 : Infinity;
      for (;;) {
        if (this.isStopped) throw new Error('Connection is closed.');
        const value = await pop(source, destination);
        if (value != null) return value;
        if (performance.now() >= end) return null;
        await this.pause();
      }
    };
    commands.quit = (...args) => {
      this.stop();
      return quit(...args);
    };
    commands.connect = (...args) => {
      this.isStopped = false;
      return connect(...args);
    };
  }

  private pause(): Promise<void> {
    return new Promise((resolve) => {
      const wait: Wait = {
        wake: resolve,
        timer: setTimeout(() => {
          this.waits.delete(wait);
          resolve();
        }, POLL_MS),
      };
      this.waits.add(wait);
    });
  }

  private stop(): void {
    this.isStopped = true;
    for (const wait of this.waits) {
      clearTimeout(wait.timer);
      wait.wake();
    }
    this.waits.clear();
  }

  override disconnect(...args: []): void {
    this.stop();
    super.disconnect(...args);
  }
}
