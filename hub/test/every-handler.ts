import { RequestMethod, type INestApplication } from '@nestjs/common';
import { METHOD_METADATA, PATH_METADATA } from '@nestjs/common/constants.js';
import { ModulesContainer, Reflector } from '@nestjs/core';
import { ACCESS, type AccessRule } from '../src/common/access/access.decorators.js';

// The names under which the gateway decorators keep what they were told.
const GATEWAY_METADATA = 'websockets:is_gateway';
const MESSAGE_METADATA = 'message';

export interface Handler {
  /** `MembersController.list` */
  name: string;
  rule: AccessRule | undefined;
  /** `null` for a socket message. */
  route: { method: 'get' | 'post' | 'put' | 'patch' | 'delete'; path: string } | null;
  message: string | null;
}

type Method = (...parameters: unknown[]) => unknown;

/** Every HTTP handler and every socket message handler that the running hub has. */
export function everyHandler(app: INestApplication): Handler[] {
  const reflector = app.get(Reflector);
  const classes = new Set<new () => object>();
  for (const module of app.get(ModulesContainer).values())
    for (const { metatype } of [...module.controllers.values(), ...module.providers.values()])
      if (typeof metatype === 'function' && metatype.prototype) classes.add(metatype as new () => object);

  return [...classes].flatMap((owner) => {
    const base = Reflect.getMetadata(PATH_METADATA, owner) as string | undefined;
    const isGateway = Reflect.getMetadata(GATEWAY_METADATA, owner) === true;
    if (base === undefined && !isGateway) return [];
    return methodsOf(owner).flatMap((method): Handler[] => {
      const path = Reflect.getMetadata(PATH_METADATA, method) as string | undefined;
      const message = Reflect.getMetadata(MESSAGE_METADATA, method) as string | undefined;
      if (path === undefined && message === undefined) return [];
      const rule = reflector.getAllAndOverride<AccessRule | undefined>(ACCESS, [method, owner]);
      const name = `${owner.name}.${method.name}`;
      if (path === undefined) return [{ name, rule, route: null, message: message ?? null }];
      const verb = RequestMethod[Reflect.getMetadata(METHOD_METADATA, method) as RequestMethod].toLowerCase();
      const whole = `/api/${base}/${path}`.replaceAll(/\/+/g, '/').replace(/\/$/, '');
      return [{ name, rule, route: { method: verb as 'get', path: whole }, message: null }];
    });
  });
}

function methodsOf(owner: new () => object): Method[] {
  const prototype = owner.prototype as Record<string, unknown>;
  return Object.getOwnPropertyNames(prototype)
    .filter((name) => name !== 'constructor')
    .map((name) => Object.getOwnPropertyDescriptor(prototype, name)?.value as unknown)
    .filter((value): value is Method => typeof value === 'function');
}
