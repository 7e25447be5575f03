import { describe, expect, test } from 'vitest';
import { invitationMail, passwordResetMail } from '@/features/accounts/mails';
import { renderMail } from '@/lib/mail/layout';
import { retryDelayMilliseconds, withoutSecrets } from '@/lib/mail/sender';

describe('a mail', () => {
  test('carries its link in the plain text and in the HTML', () => {
    const link = 'https://hilum.example/invitation/abc';
    const mail = invitationMail({
      name: 'Lena',
      inviter: 'Ada',
      dealership: 'Otter Prairie Seed',
      role: 'grower',
      link,
      days: 14,
    });
    expect(mail.text).toContain(link);
    expect(mail.html).toContain(`href="${link}"`);
    expect(mail.subject).toBe('Otter Prairie Seed invites you to Hilum');
  });

  test('shows what people wrote, and runs none of it', () => {
    const { html, text } = renderMail({ greeting: 'Hello <b>"Lena" & co</b>,', paragraphs: ['<script>alert(1)</script>'] });
    expect(html).not.toContain('<script>');
    expect(html).not.toContain('<b>');
    expect(html).toContain('&lt;script&gt;');
    expect(text).toContain('<script>alert(1)</script>');
  });

  test('for a new password says what happens if nothing is done', () => {
    const { text } = passwordResetMail({ name: 'Lena', link: 'https://hilum.example/reset-password/abc', minutes: 60 });
    expect(text).toContain('your password stays as it is');
  });
});

describe('trying a mail again', () => {
  test('waits 1, 2, 4 minutes and at most 6 hours', () => {
    expect([1, 2, 3, 20].map((attempts) => retryDelayMilliseconds(attempts) / 60_000)).toEqual([1, 2, 4, 360]);
  });
});

describe('a mail that was sent', () => {
  test('is kept without the secrets of its links, and with everything else', () => {
    const link = 'https://hilum.example/invitation/mO7lafd3nDL9NZiNGF1pB7t_X5iZL0bj';
    const mail = invitationMail({
      name: 'Lena',
      inviter: 'Ada',
      dealership: 'Otter Prairie Seed',
      role: 'grower',
      link,
      days: 14,
    });
    for (const part of [mail.text, mail.html]) {
      expect(withoutSecrets(part)).not.toContain('mO7laf');
      expect(withoutSecrets(part)).toContain('https://hilum.example/invitation/…');
    }
    expect(withoutSecrets('https://hilum.example/plans/0crxd5rgpea53jwqqywy/2027')).toContain('0crxd5rgpea53jwqqywy');
  });
});
