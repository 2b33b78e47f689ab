import type { Answer, Appearance, FromFrame, Keys, ToFrame } from './messages';

// What a page loads in place of the service's own script: as much of it as the Payment Element's libraries use.
(() => {
  if (Reflect.has(window, 'Stripe')) return;
  const script = document.currentScript;
  const origin = script instanceof HTMLScriptElement ? new URL(script.src).origin : window.location.origin;
  let sequence = 0;
  const next = (prefix: string) => `${prefix}${(sequence += 1)}`;

  type Listener = (event: unknown) => void;

  class Emitter {
    private readonly listeners = new Map<string, Listener[]>();
    on(name: string, listener: Listener): this {
      this.listeners.set(name, [...(this.listeners.get(name) ?? []), listener]);
      return this;
    }
    once(name: string, listener: Listener): this {
      const first: Listener = (event) => {
        this.off(name, first);
        listener(event);
      };
      return this.on(name, first);
    }
    off(name: string, listener?: Listener): this {
      const left = listener ? (this.listeners.get(name) ?? []).filter((one) => one !== listener) : [];
      this.listeners.set(name, left);
      return this;
    }
    protected tell(name: string, event: unknown): void {
      for (const listener of this.listeners.get(name) ?? []) listener(event);
    }
  }

  type Called =
    | { readonly name: 'submit' }
    | { readonly name: 'confirm' | 'retrieve' | 'challenge'; readonly clientSecret: string };

  /** A frame on the fake's own origin: card numbers never touch the page. */
  class Frame {
    private readonly node = document.createElement('iframe');
    private readonly pending = new Map<string, (answer: Answer) => void>();
    private settleLoaded: () => void = () => undefined;
    private readonly loaded = new Promise<void>((resolve) => (this.settleLoaded = resolve));

    constructor(
      page: 'payment' | 'challenge' | 'controller',
      title: string,
      style: string,
      private readonly keys: Keys,
      private readonly appearance: () => Appearance,
      private readonly heard: (message: FromFrame) => void = () => undefined,
    ) {
      this.node.name = next('__privateStripeFrame');
      this.node.title = title;
      this.node.src = `${origin}/v3/${page}.html`;
      this.node.allow = 'payment *';
      this.node.style.cssText = `border:0;color-scheme:light;${style}`;
      if (page === 'controller') {
        this.node.setAttribute('aria-hidden', 'true');
        this.node.tabIndex = -1;
      }
    }

    mount(place: Element): void {
      window.addEventListener('message', this.listen);
      place.append(this.node);
    }

    remove(): void {
      window.removeEventListener('message', this.listen);
      this.node.remove();
      for (const settle of this.pending.values()) {
        settle({ error: { type: 'validation_error', message: 'The payment form is no longer there.' } });
      }
      this.pending.clear();
    }

    setHeight(height: number): void {
      this.node.style.height = `${height}px`;
    }

    post(message: ToFrame): void {
      this.node.contentWindow?.postMessage(message, origin);
    }

    async call(call: Called): Promise<Answer> {
      await this.loaded;
      const id = next('call');
      return new Promise((resolve) => {
        this.pending.set(id, resolve);
        this.post({ kind: 'call', id, ...call });
      });
    }

    private readonly listen = (event: MessageEvent<FromFrame>) => {
      if (event.source !== this.node.contentWindow || event.origin !== origin) return;
      const message = event.data;
      if (message.kind === 'loaded') {
        this.post({ kind: 'init', keys: this.keys, appearance: this.appearance() });
        this.settleLoaded();
      }
      if (message.kind === 'answer') {
        this.pending.get(message.id)?.(message.answer);
        this.pending.delete(message.id);
      }
      this.heard(message);
    };
  }

  interface ElementsOptions {
    clientSecret?: string;
    appearance?: Appearance;
    [option: string]: unknown;
  }

  class PaymentElement extends Emitter {
    private frame: Frame | null = null;
    private place: Element | null = null;
    private destroyed = false;

    constructor(
      readonly type: string,
      private readonly elements: Elements,
    ) {
      super();
    }

    mount(where: string | Element): void {
      if (this.destroyed)
        throw new Error('This Element has already been destroyed. Please create a new one.');
      const place = typeof where === 'string' ? document.querySelector(where) : where;
      if (!place) throw new Error('The selector you specified applies to no DOM elements.');
      if (this.frame && this.place === place) return;
      this.unmount();
      this.place = place;
      place.classList.add('StripeElement');
      this.frame = new Frame(
        'payment',
        'Secure payment input frame',
        // As far out as the frame's own margin reaches, which leaves room for the fields' outlines.
        'display:block;margin:-2px;width:calc(100% + 4px);height:200px',
        this.elements.keys,
        () => this.elements.options.appearance ?? {},
        (message) => this.hear(message),
      );
      this.tell('loaderstart', { elementType: this.type });
      this.frame.mount(place);
    }

    unmount(): void {
      this.frame?.remove();
      this.place?.classList.remove('StripeElement');
      this.frame = null;
      this.place = null;
    }

    destroy(): void {
      this.unmount();
      this.destroyed = true;
      this.elements.forget(this);
    }

    update(): void {}
    blur(): void {}
    collapse(): void {}
    focus(): void {
      this.frame?.post({ kind: 'focus' });
    }
    clear(): void {
      this.frame?.post({ kind: 'clear' });
    }

    dress(appearance: Appearance): void {
      this.frame?.post({ kind: 'appearance', appearance });
    }

    call(call: Called): Promise<Answer> {
      if (this.frame) return this.frame.call(call);
      return Promise.resolve({
        error: { type: 'validation_error', message: 'The Payment Element is not mounted.' },
      });
    }

    private hear(message: FromFrame): void {
      const about = { elementType: this.type };
      if (message.kind === 'loaded') this.tell('ready', about);
      if (message.kind === 'height') this.frame?.setHeight(message.height);
      if (message.kind === 'focus' || message.kind === 'blur') this.tell(message.kind, about);
      if (message.kind === 'change') {
        const { complete, empty } = message;
        this.tell('change', { ...about, complete, empty, collapsed: false, value: { type: 'card' } });
      }
    }
  }

  class Elements extends Emitter {
    private made: PaymentElement[] = [];

    constructor(
      readonly keys: Keys,
      readonly options: ElementsOptions,
    ) {
      super();
      const { clientSecret } = options;
      if (clientSecret !== undefined && !/^(pi|seti)_\w+_secret_\w+$/.test(clientSecret)) {
        throw new Error(
          'Invalid value for elements(): clientSecret should be a client secret of the form ${id}_secret_${secret}.',
        );
      }
    }

    create(type: string): PaymentElement {
      if (type !== 'payment') throw new Error(`The Element '${type}' is not part of this fake.`);
      if (this.made.length > 0) throw new Error(`Can only create one Element of type ${type}.`);
      const element = new PaymentElement(type, this);
      this.made.push(element);
      return element;
    }

    getElement(type: string): PaymentElement | null {
      return this.made.find((element) => element.type === type) ?? null;
    }

    forget(element: PaymentElement): void {
      this.made = this.made.filter((one) => one !== element);
    }

    update(options: ElementsOptions): Promise<void> {
      Object.assign(this.options, options);
      if (options.appearance) for (const element of this.made) element.dress(options.appearance);
      return Promise.resolve();
    }

    fetchUpdates(): Promise<object> {
      return Promise.resolve({});
    }

    async submit(): Promise<object> {
      const answer = await this.made[0]?.call({ name: 'submit' });
      if (!answer) return { error: { type: 'validation_error', message: 'There is no Payment Element.' } };
      return 'error' in answer ? answer : { selectedPaymentMethod: 'card' };
    }
  }

  interface ConfirmOptions {
    readonly elements?: Elements;
    readonly clientSecret?: string;
    readonly redirect?: 'if_required' | 'always';
    readonly confirmParams?: { readonly return_url?: string };
  }

  const unsupported = (name: string) => () => Promise.reject(new Error(`${name} is not part of this fake.`));

  function Stripe(publishableKey: unknown, options: { readonly stripeAccount?: string } = {}) {
    if (typeof publishableKey !== 'string' || !publishableKey.startsWith('pk_')) {
      throw new Error(`Invalid API key: ${String(publishableKey)}`);
    }
    const keys: Keys = { publishableKey, account: options.stripeAccount ?? '' };
    const plain = () => ({});
    let controller: Frame | null = null;

    function control(): Frame {
      if (controller) return controller;
      controller = new Frame('controller', 'Payment controller', 'display:none', keys, plain);
      controller.mount(document.body);
      return controller;
    }

    /** Shows the bank's question over the page until it is answered. */
    async function answerChallenge(clientSecret: string): Promise<Answer> {
      const frame = new Frame(
        'challenge',
        'Secure authentication frame',
        'position:fixed;inset:0;width:100%;height:100%;z-index:2147483647',
        keys,
        plain,
      );
      frame.mount(document.body);
      try {
        return await frame.call({ name: 'challenge', clientSecret });
      } finally {
        frame.remove();
      }
    }

    async function throughActions(answer: Answer): Promise<Answer> {
      if (!('paymentIntent' in answer) || answer.paymentIntent?.status !== 'requires_action') return answer;
      return answerChallenge(answer.paymentIntent.client_secret);
    }

    return {
      _apiKey: publishableKey,
      _registerWrapper: () => undefined,
      registerAppInfo: () => undefined,
      createToken: unsupported('createToken'),
      createPaymentMethod: unsupported('createPaymentMethod'),
      confirmCardPayment: unsupported('confirmCardPayment'),
      confirmSetup: unsupported('confirmSetup'),
      elements: (given: ElementsOptions = {}) => new Elements(keys, { ...given }),
      confirmPayment: async ({ elements, clientSecret, redirect, confirmParams }: ConfirmOptions) => {
        const returnUrl = confirmParams?.return_url;
        if (redirect !== 'if_required' && !returnUrl)
          throw new Error('confirmParams.return_url is required.');
        const element = elements?.getElement('payment');
        const secret = clientSecret ?? elements?.options.clientSecret;
        if (!element || !secret) throw new Error('confirmPayment() needs elements with a mounted form.');
        const answer = await throughActions(await element.call({ name: 'confirm', clientSecret: secret }));
        if (redirect === 'if_required' || !returnUrl || !('paymentIntent' in answer)) return answer;
        const { paymentIntent } = answer;
        const back = new URL(returnUrl);
        back.searchParams.set('payment_intent', paymentIntent?.id ?? '');
        back.searchParams.set('payment_intent_client_secret', secret);
        back.searchParams.set(
          'redirect_status',
          paymentIntent?.status === 'succeeded' ? 'succeeded' : 'pending',
        );
        window.location.assign(back);
        return new Promise<never>(() => undefined);
      },
      handleNextAction: async ({ clientSecret }: { readonly clientSecret: string }) =>
        throughActions(await control().call({ name: 'retrieve', clientSecret })),
      retrievePaymentIntent: (clientSecret: string) => control().call({ name: 'retrieve', clientSecret }),
    };
  }

  // The loader warns when the script is of another release train than its own.
  Object.assign(window, { Stripe: Object.assign(Stripe, { version: 'endive' }) });
})();
