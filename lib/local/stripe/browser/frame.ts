import type { Answer, BrowserError, BrowserIntent, FromFrame, Keys, ToFrame } from './messages';

// Runs inside the frames; which of them tells `data-role`. Only the page that `data-host` names is listened to.
(() => {
  const root = document.documentElement;
  const host = root.dataset.host ?? '';
  const role = root.dataset.role ?? '';
  let keys: Keys = { publishableKey: '', account: '' };

  const tell = (message: FromFrame) => window.parent.postMessage(message, host);
  const field = (id: string): HTMLInputElement | null => {
    const node = document.getElementById(id);
    return node instanceof HTMLInputElement ? node : null;
  };
  const digits = (id: string) => (field(id)?.value ?? '').replace(/\D/g, '');

  const connectionLost: BrowserError = {
    type: 'api_connection_error',
    message: 'The connection to the payment service was lost.',
  };

  async function ask(method: 'GET' | 'POST', path: string, more: Record<string, string>): Promise<Answer> {
    const form = new URLSearchParams({ key: keys.publishableKey, ...more });
    if (keys.account) form.set('_stripe_account', keys.account);
    try {
      const answer =
        method === 'GET'
          ? await fetch(`${path}?${form.toString()}`)
          : await fetch(path, { method, body: form });
      const body: unknown = await answer.json();
      if (typeof body === 'object' && body && 'error' in body) return { error: body.error as BrowserError };
      return { paymentIntent: body as BrowserIntent };
    } catch {
      return { error: connectionLost };
    }
  }

  const intentPath = (clientSecret: string) => `/payment_intents/${clientSecret.split('_secret_')[0] ?? ''}`;

  /** Puts a refusal that the intent carries where a caller looks for it. */
  function settled(answer: Answer): Answer {
    if (!('paymentIntent' in answer)) return answer;
    const intent = answer.paymentIntent;
    if (intent?.status !== 'requires_payment_method' || !intent.last_payment_error) return answer;
    return { error: { ...intent.last_payment_error, payment_intent: intent } };
  }

  // ---- the card form

  const SENTENCES: Record<string, readonly [code: string, sentence: string]> = {
    'number incomplete': ['incomplete_number', 'Your card number is incomplete.'],
    'number invalid': ['invalid_number', 'Your card number is invalid.'],
    'expiry incomplete': ['incomplete_expiry', "Your card's expiration date is incomplete."],
    'expiry past': ['invalid_expiry_year_past', "Your card's expiration year is in the past."],
    'cvc incomplete': ['incomplete_cvc', "Your card's security code is incomplete."],
  };

  /** ISO/IEC 7812-1 check digit. */
  function sumsUp(number: string): boolean {
    const sum = [...number].reverse().reduce((total, letter, index) => {
      const digit = Number(letter) * (index % 2 === 1 ? 2 : 1);
      return total + (digit > 9 ? digit - 9 : digit);
    }, 0);
    return sum % 10 === 0;
  }

  function faultOf(id: string): string {
    const typed = digits(id);
    if (id === 'number') {
      if (typed.length < 16) return 'incomplete';
      return sumsUp(typed) ? '' : 'invalid';
    }
    if (id === 'cvc') return typed.length < 3 ? 'incomplete' : '';
    const month = Number(typed.slice(0, 2));
    if (typed.length < 4 || month < 1 || month > 12) return 'incomplete';
    return new Date(2000 + Number(typed.slice(2, 4)), month, 1) <= new Date() ? 'past' : '';
  }

  const FIELDS = ['number', 'expiry', 'cvc'];

  function showFault(id: string): BrowserError | null {
    const found = SENTENCES[`${id} ${faultOf(id)}`] ?? null;
    const place = document.getElementById(`${id}-error`);
    if (place) place.textContent = found?.[1] ?? '';
    field(id)?.setAttribute('aria-invalid', String(found !== null));
    field(id)?.classList.toggle('Input--invalid', found !== null);
    return found ? { type: 'validation_error', code: found[0], message: found[1] } : null;
  }

  function validate(): BrowserError | null {
    const faults = FIELDS.map(showFault);
    const at = faults.findIndex((fault) => fault !== null);
    if (at >= 0) field(FIELDS[at] ?? '')?.focus();
    measure();
    return faults[at] ?? null;
  }

  const measure = () => tell({ kind: 'height', height: document.body.offsetHeight });

  async function confirm(clientSecret: string): Promise<Answer> {
    const fault = validate();
    if (fault) return { error: fault };
    const expiry = digits('expiry');
    const answer = await ask('POST', `/v1${intentPath(clientSecret)}/confirm`, {
      client_secret: clientSecret,
      'payment_method_data[type]': 'card',
      'payment_method_data[card][number]': digits('number'),
      'payment_method_data[card][exp_month]': String(Number(expiry.slice(0, 2))),
      'payment_method_data[card][exp_year]': `20${expiry.slice(2, 4)}`,
      'payment_method_data[card][cvc]': digits('cvc'),
    });
    return settled(answer);
  }

  function startCardForm(): void {
    const form = document.querySelector('form');
    form?.addEventListener('submit', (event) => event.preventDefault());
    form?.addEventListener('input', (event) => {
      const input = event.target;
      if (!(input instanceof HTMLInputElement)) return;
      const typed = input.value.replace(/\D/g, '');
      if (input.id === 'number') input.value = typed.slice(0, 16).replace(/(.{4})(?=.)/g, '$1 ');
      if (input.id === 'expiry') {
        input.value = typed.length > 2 ? `${typed.slice(0, 2)} / ${typed.slice(2, 4)}` : typed;
      }
      if (input.id === 'cvc') input.value = typed.slice(0, 4);
      if (input.getAttribute('aria-invalid') === 'true' && faultOf(input.id) === '') showFault(input.id);
      tell({
        kind: 'change',
        complete: FIELDS.every((id) => faultOf(id) === ''),
        empty: FIELDS.every((id) => digits(id) === ''),
      });
      measure();
    });
    window.addEventListener('focusin', () => tell({ kind: 'focus' }));
    window.addEventListener('focusout', (event) => {
      const left = event.target;
      if (left instanceof HTMLInputElement && left.value !== '') showFault(left.id);
      tell({ kind: 'blur' });
      measure();
    });
    new ResizeObserver(measure).observe(document.body);
  }

  // ---- looks

  const VARIABLES = new Set(
    'colorPrimary colorBackground colorText colorTextSecondary colorTextPlaceholder colorDanger fontFamily fontSizeBase fontSizeSm fontWeightNormal fontWeightMedium borderRadius spacingUnit'.split(
      ' ',
    ),
  );
  const SELECTOR = /^\.(Input|Label|Error)(--invalid)?(:focus|:hover|::placeholder)?$/;
  const VALUE = /^[^;{}<>]*$/;
  const kebab = (name: string) => name.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`);
  const isPlain = (value: string) => VALUE.test(value) && !/url\(|@import/i.test(value);

  function dress(appearance: Extract<ToFrame, { kind: 'appearance' }>['appearance']): void {
    for (const [name, value] of Object.entries(appearance.variables ?? {})) {
      if (VARIABLES.has(name) && isPlain(value)) root.style.setProperty(`--${name}`, value);
    }
    document.getElementById('given-rules')?.remove();
    const sheet = document.createElement('style');
    sheet.id = 'given-rules';
    document.head.append(sheet);
    for (const [selector, declarations] of Object.entries(appearance.rules ?? {})) {
      if (!SELECTOR.test(selector)) continue;
      const body = Object.entries(declarations)
        .filter(([name, value]) => /^[a-zA-Z]+$/.test(name) && isPlain(value))
        .map(([name, value]) => `${kebab(name)}:${value}`)
        .join(';');
      sheet.sheet?.insertRule(`${selector}{${body}}`, sheet.sheet.cssRules.length);
    }
    if (role === 'payment') measure();
  }

  // ---- the bank's question (3-D Secure)

  /** Waits for the buyer's decision, then tells it to the service. */
  async function challenge(clientSecret: string): Promise<Answer> {
    const outcome = await new Promise<string>((resolve) => {
      for (const button of document.querySelectorAll('button')) {
        button.addEventListener('click', () => resolve(button.value), { once: true });
      }
      document.querySelector('button')?.focus();
    });
    for (const button of document.querySelectorAll('button')) button.disabled = true;
    return settled(
      await ask('POST', `/v3${intentPath(clientSecret)}/challenge`, { client_secret: clientSecret, outcome }),
    );
  }

  async function carryOut(call: Extract<ToFrame, { kind: 'call' }>): Promise<Answer> {
    switch (call.name) {
      case 'submit': {
        const fault = validate();
        return fault ? { error: fault } : {};
      }
      case 'confirm':
        return confirm(call.clientSecret);
      case 'challenge':
        return challenge(call.clientSecret);
      case 'retrieve':
        return ask('GET', `/v1${intentPath(call.clientSecret)}`, { client_secret: call.clientSecret });
    }
  }

  window.addEventListener('message', (event: MessageEvent<ToFrame>) => {
    if (event.source !== window.parent || event.origin !== host) return;
    const message = event.data;
    switch (message.kind) {
      case 'init':
        keys = message.keys;
        dress(message.appearance);
        break;
      case 'appearance':
        dress(message.appearance);
        break;
      case 'focus':
        field('number')?.focus();
        break;
      case 'clear':
        for (const id of FIELDS) {
          const input = field(id);
          if (input) input.value = '';
        }
        break;
      case 'call':
        void carryOut(message).then((answer) => tell({ kind: 'answer', id: message.id, answer }));
        break;
    }
  });
  if (role === 'payment') startCardForm();
  tell({ kind: 'loaded' });
})();
