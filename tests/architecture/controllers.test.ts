import 'reflect-metadata';
import { readFileSync } from 'node:fs';
import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { AppModule } from '@eremite/service/app.module.ts';
import { readEnv } from '@eremite/service/config/env.ts';
import type { DynamicModule, Type } from '@nestjs/common';
import { describe, expect, it } from 'vitest';

type ModuleLike = Type | DynamicModule | { forwardRef: () => Type };
interface Argument {
  readonly index: number;
  readonly data?: unknown;
  readonly schema?: unknown;
}

/** Numbers Nest gives to the kinds of arguments, in its metadata keys. */
const VALIDATED: Record<string, string> = { 3: '@Body', 4: '@Query', 5: '@Param' };
const RESPONSE = '1';

function controllersOf(module: ModuleLike, seen = new Set<unknown>()): Type[] {
  const target = 'forwardRef' in module ? module.forwardRef() : 'module' in module ? module.module : module;
  if (seen.has(target)) return [];
  seen.add(target);
  const dynamic = 'module' in module ? module : undefined;
  const list = <T>(key: 'imports' | 'controllers'): T[] => [
    ...((Reflect.getMetadata(key, target) ?? []) as T[]),
    ...((dynamic?.[key] ?? []) as T[]),
  ];
  return [...list<Type>('controllers'), ...list<ModuleLike>('imports').flatMap((inner) => controllersOf(inner, seen))];
}

interface Route {
  readonly name: string;
  readonly handler: object;
  readonly controller: Type;
  readonly args: Record<string, Argument>;
}

function routesOf(controller: Type): Route[] {
  const prototype = controller.prototype as Record<string, unknown>;
  return Object.getOwnPropertyNames(prototype)
    .filter((method) => method !== 'constructor')
    .map((method) => ({ method, handler: prototype[method] }))
    .filter(({ handler }) => typeof handler === 'function' && Reflect.hasMetadata('path', handler))
    .map(({ method, handler }) => ({
      name: `${controller.name}.${method}`,
      handler: handler as object,
      controller,
      args: (Reflect.getMetadata('__routeArguments__', controller, method) ?? {}) as Record<string, Argument>,
    }));
}

const env = readEnv({ databaseInMemory: true, demo: false });
const routes = controllersOf(AppModule.register(env)).flatMap(routesOf);

describe('controllers', () => {
  it('are found by this test', () => {
    expect(routes.length).toBeGreaterThan(25);
    expect(routes.map((route) => route.name)).toContain('SurveysController.create');
  });

  it('take no body, query or parameter without a schema', () => {
    const bare = routes.flatMap(({ name, args }) =>
      Object.entries(args)
        .filter(([key, arg]) => VALIDATED[key.split(':')[0]!] && !arg.schema)
        .map(([key, arg]) => `${name}: ${VALIDATED[key.split(':')[0]!]}(${String(arg.data ?? '')})`),
    );
    expect(bare).toEqual([]);
  });

  it('answer through a schema, unless they answer nothing or write the answer themselves', () => {
    const bare = routes.filter(({ handler, controller, args }) => {
      const options = Reflect.getMetadata('class_serializer:options', handler) as { schema?: unknown } | undefined;
      const onClass = Reflect.getMetadata('class_serializer:options', controller) as { schema?: unknown } | undefined;
      if (options?.schema ?? onClass?.schema) return false;
      const isEmpty = Reflect.getMetadata('__httpCode__', handler) === 204;
      const isText = Reflect.hasMetadata('__headers__', handler);
      const writes = Object.keys(args).some((key) => key.startsWith(`${RESPONSE}:`));
      return !isEmpty && !isText && !writes;
    });
    expect(bare.map((route) => route.name)).toEqual([]);
  });

  it('keep to one place that reads the environment', async () => {
    const src = join(import.meta.dirname, '../../service/src');
    const sources = (await readdir(src, { recursive: true })).filter((path) => /(?<!\.spec)\.ts$/.test(path));
    const readers = sources.filter((path) =>
      /process\.env/.test(readFileSync(join(src, path), 'utf8').replace(/^\s*(\/\/|\*|\/\*).*$/gm, '')),
    );
    expect(readers).toEqual(['config/env.ts']);
  });
});
