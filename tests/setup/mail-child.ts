/** The mail's pump as a process of its own, which says when the service has answered and then waits to be killed. */
import { openDatabase } from '@/db/open';
import { hostedService } from '@/lib/mail/hosted-service';
import { MailPump } from '@/worker/mail/pump';

const [file = '', url = '', key = '', secret = '', hang = ''] = process.argv.slice(2);
const say = (word: string): void => void process.stdout.write(`${word}\n`);

const database = openDatabase(file);
const pump = new MailPump({
  db: database.db,
  service: hostedService({ key, url, from: 'Tallyframe <letters@frames.example>' }),
  site: 'https://frames.example',
  secret,
  log: (message) => void process.stderr.write(`${message}\n`),
  onAnswered: () => {
    say('answered');
    // Between the answer and its record: here it is killed.
    return hang === 'hang' ? new Promise<void>((resolve) => setTimeout(resolve, 60_000)) : undefined;
  },
});
await pump.look();
say('done');
await pump.close();
await database.close();
