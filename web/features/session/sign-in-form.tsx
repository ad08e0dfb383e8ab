import { zodResolver } from '@hookform/resolvers/zod'
import { useForm } from 'react-hook-form'
import { signInRequestSchema, type SignInRequest } from '#shared/schemas/session.ts'
import { Banner } from '#web/components/ui/banner.tsx'
import { Button } from '#web/components/ui/button.tsx'
import { TextField } from '#web/components/ui/text-fields.tsx'
import { useSignIn } from './mutations.ts'
import { signInFailure } from './sign-in-words.ts'

export function SignInForm({ onSignedIn }: { onSignedIn: () => void }) {
  const signIn = useSignIn()
  const { register, handleSubmit, formState } = useForm<SignInRequest>({ resolver: zodResolver(signInRequestSchema) })
  const { errors } = formState

  const handleSignIn = handleSubmit((request) => signIn.mutate(request, { onSuccess: onSignedIn }))

  return (
    <form noValidate onSubmit={(event) => void handleSignIn(event)} className="grid gap-[14px]">
      {signIn.error !== null && (
        <Banner tone="bad" title="Not signed in.">
          {signInFailure(signIn.error)}
        </Banner>
      )}
      <TextField label="E-mail" type="email" autoComplete="username" inputMode="email" autoCapitalize="none" spellCheck={false} error={errors.email?.message} {...register('email')} />
      <TextField label="Password" type="password" autoComplete="current-password" error={errors.password?.message} {...register('password')} />
      <Button type="submit" kind="primary" size="touch" busyLabel={signIn.isPending && 'Signing in'} className="mt-1">
        Sign in
      </Button>
    </form>
  )
}
